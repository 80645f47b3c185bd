import { timeText, type Clock } from '../../clock';
import type { Database } from '../../database/database';
import type { Journal } from '../../journal/journal';
import type { KeptFiles } from '../kept-files';
import type { RecordsStore } from '../records-store';
import type { CellStorage } from '../storing/cell-storage';
import type { DueSet, KeepingStore } from './keeping-store';

export interface RetentionParts {
  readonly database: Database;
  readonly records: RecordsStore;
  readonly keeping: KeepingStore;
  readonly files: KeptFiles;
  readonly cells: Pick<CellStorage, 'clear'>;
  readonly journal: Journal;
  readonly clock: Clock;
}

/**
 * Erases the rows of record sets whose last day has passed. What an edition has to name stays: number, SHA-256, row
 * count, names and kinds of the columns, who and when.
 */
export class Retention {
  constructor(private readonly parts: RetentionParts) {}

  /** Each set in a unit of work of its own; cells and files go after it, and again the next time after a crash. */
  async eraseDue(): Promise<void> {
    const today = timeText(this.parts.clock).slice(0, 10);
    for (const set of await this.parts.keeping.setsDue(today)) await this.eraseSet(set.id, today);
    await this.clearErased();
  }

  private async eraseSet(id: string, today: string): Promise<void> {
    const { database, records, keeping, clock } = this.parts;
    await database.unitOfWork(async () => {
      // Asked again: somebody may have put the date off a moment ago.
      const set = (await keeping.setsDue(today)).find((due) => due.id === id);
      if (!set) return;
      const erasedAt = timeText(clock);
      const revisions = (await records.revisionsOf([id])).filter((revision) => revision.erasedAt === null);
      for (const revision of revisions) await keeping.erase(revision.id, erasedAt);
      await records.markSetChanged(id, erasedAt);
      await this.note(set, revisions.length);
    });
  }

  private async note({ id, name, retainUntil }: DueSet, count: number): Promise<void> {
    const revisions = count === 1 ? '1 revision' : `${count} revisions`;
    await this.parts.journal.write({
      actorId: null,
      action: 'records-erased',
      subjectKind: 'record-set',
      subjectId: id,
      summary: `The rows of ${revisions} of ${name} were erased, which were to be kept until ${retainUntil}`,
    });
  }

  private async clearErased(): Promise<void> {
    const { keeping, cells, files } = this.parts;
    for (const name of await keeping.erasedOriginals()) await files.remove(files.pathOf(name));
    for (const revisionId of await keeping.erasedWithCells()) await cells.clear(revisionId);
  }
}
