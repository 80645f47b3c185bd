import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';

export interface JournalNote {
  /** Null for the service itself. */
  readonly actorId: string | null;
  /** What was done, as a past participle in kebab-case: `edition-put-in-force`. */
  readonly action: string;
  readonly subjectKind: string;
  readonly subjectId: string | null;
  /** One sentence for people; no secrets. */
  readonly summary: string;
}

/** The append-only record of who did what. Written inside the unit of work that it tells of. */
export class Journal {
  constructor(
    private readonly database: Database,
    private readonly clock: Clock,
  ) {}

  async write(note: JournalNote): Promise<void> {
    await this.database
      .table('journal')
      .insert({ ...note, summary: note.summary.slice(0, 500), at: timeText(this.clock) });
  }
}
