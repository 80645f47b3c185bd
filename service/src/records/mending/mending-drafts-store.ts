import type { Database } from '../../database/database';
import type { MendStep } from './step-change';

export interface MendingDraft {
  readonly steps: readonly MendStep[];
  readonly changedAt: string;
}

interface DraftRow {
  readonly revisionId: string;
  readonly personId: string;
  /** JSON. */
  readonly steps: string;
  readonly changedAt: string;
}

/** The steps that each person is working on for a revision. */
export class MendingDraftsStore {
  constructor(private readonly database: Database) {}

  async find(revisionId: string, personId: string): Promise<MendingDraft | null> {
    const row = await this.table().where({ revisionId, personId }).first();
    return row ? { steps: JSON.parse(row.steps) as MendStep[], changedAt: row.changedAt } : null;
  }

  async keep(revisionId: string, personId: string, { steps, changedAt }: MendingDraft): Promise<void> {
    await this.table()
      .insert({ revisionId, personId, steps: JSON.stringify(steps), changedAt })
      .onConflict(['revisionId', 'personId'])
      .merge();
  }

  async remove(revisionId: string, personId: string): Promise<void> {
    await this.table().where({ revisionId, personId }).delete();
  }

  private table() {
    return this.database.table<DraftRow>('mendingDrafts');
  }
}
