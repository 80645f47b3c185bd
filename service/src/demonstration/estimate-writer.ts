import type { AskedCase } from './asked-cases';
import type { Stage } from './stage';

const atOnce = 250;

/** Answers what partners asked, at the time they asked it, by the edition in force at that time. */
export class EstimateWriter {
  private position = 0;
  written = 0;

  constructor(
    private readonly stage: Stage,
    private readonly cases: readonly AskedCase[],
  ) {}

  async writeUntil(time: number): Promise<void> {
    while (this.position < this.cases.length && this.cases[this.position].at < time) await this.writeSome(time);
  }

  private async writeSome(time: number): Promise<void> {
    const due = this.cases.slice(this.position, this.position + atOnce).filter((asked) => asked.at < time);
    this.position += due.length;
    await this.stage.services.database.unitOfWork(async () => {
      for (const asked of due) await this.write(asked);
    });
  }

  /** Nobody asks before they have a key and the estimator an edition. */
  private async write({ at, partner, slug, inputs }: AskedCase): Promise<void> {
    const key = this.stage.keys.get(partner);
    if (!key || !this.stage.published.has(slug)) return;
    this.stage.clock.moveTo(at);
    await this.stage.services.estimates.estimate({ key, slug, inputs: { ...inputs } });
    await this.stage.services.database
      .table<{ id: string; lastUsedAt: string }>('keys')
      .where({ id: key.id })
      .update({ lastUsedAt: new Date(at).toISOString() });
    this.written += 1;
  }
}
