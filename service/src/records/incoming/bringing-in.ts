import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import { translateUnique } from '../../database/constraint-errors';
import { newId } from '../../database/new-id';
import { DeskError, notFound } from '../../errors';
import type { Journal } from '../../journal/journal';
import { requireNotPast } from '../keeping/retention-date';
import { rowsText } from '../findings/finding';
import { requireExpectedNewest } from '../newest-guard';
import type { RecordsStore, RevisionRecord } from '../records-store';
import { revisionWithRows, withRowsOf } from '../required-rows';
import type { Around, Import, RevisionImporter, StoredRevision } from '../revision-importer';
import type { TaskContext, TaskWork } from '../tasks/record-tasks';
import { nameTaken } from './record-set-words';

/** As what a file is brought in: a new set, a set's next revision, or more rows below those of a revision. */
export type Destination = components['schemas']['BringInRequest']['as'];
type NewSet = Extract<Destination, { kind: 'record-set' }>;
type Revision = Extract<Destination, { kind: 'revision' }>;
type Appended = Extract<Destination, { kind: 'appended' }>;

export interface FileToBringIn extends Omit<Import, 'base'> {
  /** Done within the unit of work that makes the revision, so that either both are or none. */
  readonly alongside?: () => Promise<void>;
}

export interface BringingInParts {
  readonly records: RecordsStore;
  readonly importer: RevisionImporter;
  readonly journal: Journal;
  readonly clock: Clock;
}

interface Note {
  readonly action: string;
  readonly recordSetId: string;
  readonly summary: string;
}

/** Where a file goes, and what must hold for it: asked before the work, to spare it, and again where it counts. */
export class BringingIn {
  constructor(private readonly parts: BringingInParts) {}

  /** The work to be done as a task. Throws at once what can be known before it. */
  async workOf(given: FileToBringIn, destination: Destination): Promise<TaskWork> {
    const run = await this.runOf(given, destination);
    return { kind: 'bring-in', personId: given.personId, run };
  }

  private runOf(given: FileToBringIn, destination: Destination): Promise<TaskWork['run']> {
    if (destination.kind === 'record-set') return this.newSet(given, destination);
    return destination.kind === 'revision' ? this.nextRevision(given, destination) : this.appended(given, destination);
  }

  private async newSet(given: FileToBringIn, { name: asSent, description = '', retainUntil = null }: NewSet) {
    const { records, clock } = this.parts;
    const name = asSent.trim();
    if (retainUntil !== null) requireNotPast(retainUntil, timeText(clock).slice(0, 10), '#/as/retainUntil');
    if (await records.nameIsTaken(name)) throw nameTaken(name, '#/as/name');
    return async (context: TaskContext) => {
      const id = newId();
      await this.parts.importer.bringIn({ ...given, base: null }, context, async (store) => {
        const now = timeText(clock);
        const words = { id, name, description: description.trim(), retainUntil };
        await translateUnique(
          () => records.insertSet({ ...words, changedAt: now, createdAt: now, createdBy: given.personId }),
          'record_sets.name_key',
          () => nameTaken(name, '#/as/name'),
        );
        const stored = await store({ recordSetId: id, number: await records.takeNumber(id) });
        const summary = `The record set ${name} was brought in from ${given.fileName}: ${rowsOf(stored)}`;
        await this.finish(given, { action: 'record-set-created', recordSetId: id, summary });
      });
      return { recordSetId: id };
    };
  }

  private async nextRevision(given: FileToBringIn, { recordSetId, expectedNewest }: Revision) {
    await this.requireOpenSet(recordSetId, expectedNewest);
    return async (context: TaskContext) => {
      await this.parts.importer.bringIn({ ...given, base: null }, context, async (store) => {
        const newest = await this.requireOpenSet(recordSetId, expectedNewest);
        const number = await this.parts.records.takeNumber(recordSetId);
        const stored = await store({ recordSetId, number });
        const summary = `Revision ${number} of ${newest.recordSetName} was brought in from ${given.fileName}: ${rowsOf(stored)}`;
        await this.finish(given, { action: 'record-revision-added', recordSetId, summary });
      });
      return { recordSetId };
    };
  }

  private async appended(given: FileToBringIn, { revisionId, expectedNewest }: Appended) {
    const { recordSetId } = await this.requireBase(revisionId);
    await this.requireOpenSet(recordSetId, expectedNewest);
    return async (context: TaskContext) => {
      const base = await this.requireBase(revisionId);
      const append: Around = async (store) => {
        await this.requireBase(revisionId);
        await this.requireOpenSet(recordSetId, expectedNewest);
        const number = await this.parts.records.takeNumber(recordSetId);
        const stored = await store({ recordSetId, number });
        const summary = `Revision ${number} of ${base.recordSetName} is revision ${base.number} with ${given.fileName} appended: ${rowsOf(stored)}`;
        await this.finish(given, { action: 'record-revision-appended', recordSetId, summary });
      };
      const { records, importer } = this.parts;
      await withRowsOf(records, [revisionId], () => importer.bringIn({ ...given, base }, context, append));
      return { recordSetId };
    };
  }

  private async finish(given: FileToBringIn, { action, recordSetId, summary }: Note): Promise<void> {
    await this.parts.records.markSetChanged(recordSetId, timeText(this.parts.clock));
    await given.alongside?.();
    const subject = { subjectKind: 'record-set', subjectId: recordSetId };
    await this.parts.journal.write({ actorId: given.personId, action, ...subject, summary });
  }

  private requireBase(id: string): Promise<RevisionRecord> {
    return revisionWithRows(this.parts.records, id);
  }

  /** The set's newest revision. A set whose last day has passed takes no more rows: they would be erased at once. */
  private async requireOpenSet(recordSetId: string, expectedNewest: number | undefined): Promise<RevisionRecord> {
    const { records, clock } = this.parts;
    const set = await records.findSet(recordSetId);
    if (!set) throw notFound('record set');
    if (set.retainUntil !== null && set.retainUntil < timeText(clock).slice(0, 10))
      throw new DeskError(
        'records-erased',
        `The rows of ${set.name} were to be kept until ${set.retainUntil}, and are erased. Set a later date first, if you may keep what you bring in.`,
      );
    return requireExpectedNewest(records, recordSetId, expectedNewest);
  }
}

function rowsOf({ rowCount, appendedRowCount, setAsideCount }: StoredRevision): string {
  const rows =
    appendedRowCount === null
      ? rowsText(rowCount)
      : `${rowsText(appendedRowCount)} added, ${rowsText(rowCount)} in all`;
  if (setAsideCount === 0) return rows;
  const columns = setAsideCount === 1 ? '1 column was' : `${setAsideCount} columns were`;
  return `${rows}; ${columns} set aside, so the file itself was not kept`;
}
