import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import type { Database } from '../../database/database';
import type { Journal } from '../../journal/journal';
import type { KeptFiles } from '../kept-files';
import { requireExpectedNewest } from '../newest-guard';
import type { RecordsStore, RevisionRecord } from '../records-store';
import { revisionWithRows, withRowsOf } from '../required-rows';
import { translateFullDisk } from '../storage-full';
import { storeColumns } from '../store-columns';
import type { CellStorage } from '../storing/cell-storage';
import type { RecordTasks, TaskContext, TaskWork } from '../tasks/record-tasks';
import type { MendingDraftsStore } from './mending-drafts-store';
import type { Mended, MendingThread } from './mending-thread';
import type { MendStep } from './step-change';

type Schemas = components['schemas'];

export interface MendingParts {
  readonly database: Database;
  readonly records: RecordsStore;
  readonly files: KeptFiles;
  readonly cells: CellStorage;
  readonly drafts: MendingDraftsStore;
  readonly thread: MendingThread;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly tasks: RecordTasks;
}

/** What to make of which revision, for whom. */
interface WantedMending {
  readonly personId: string;
  readonly revisionId: string;
  readonly steps: readonly MendStep[];
  /** The set's newest revision as the person knows it. */
  readonly expectedNewest?: number;
}

export class MendingService {
  constructor(private readonly parts: MendingParts) {}

  /** Begins a new revision of the same set, made from this one by steps that are kept with it. */
  async mend(personId: string, revisionId: string, request: Schemas['MendRequest']): Promise<Schemas['RecordTask']> {
    return this.parts.tasks.start(await this.workOf({ personId, revisionId, ...request }));
  }

  /** The same, to its end: the new revision's id. */
  async mendToEnd(personId: string, revisionId: string, steps: readonly MendStep[]): Promise<string> {
    return this.parts.tasks.finish(await this.workOf({ personId, revisionId, steps }));
  }

  /** What the steps would do. */
  async tryOut(revisionId: string, steps: readonly MendStep[], signal?: AbortSignal): Promise<Schemas['MendingTrial']> {
    const { records, thread } = this.parts;
    await this.requireBase(revisionId);
    return withRowsOf(records, [revisionId], () => thread.tryOut({ revisionId, steps }, signal));
  }

  private async workOf(wanted: WantedMending): Promise<TaskWork> {
    const base = await this.requireBase(wanted.revisionId);
    await requireExpectedNewest(this.parts.records, base.recordSetId, wanted.expectedNewest);
    return { kind: 'mend', personId: wanted.personId, run: (context) => this.make(wanted, context) };
  }

  private async make(wanted: WantedMending, context: TaskContext): Promise<{ readonly recordSetId: string }> {
    const { files, cells, database } = this.parts;
    const { revisionId: id, signal, progress } = context;
    const spillPath = files.newSpillPath();
    const { recordSetId } = await this.requireBase(wanted.revisionId);
    try {
      const mended = await this.apply(wanted, spillPath, context);
      const keep = (): Promise<void> => database.unitOfWork(() => this.store(id, wanted, mended));
      const stored = { revisionId: id, table: mended.table, spillPath };
      await cells.storeFor(stored, keep, { signal, onProgress: progress });
      return { recordSetId };
    } catch (error) {
      throw translateFullDisk(error);
    } finally {
      await files.remove(spillPath);
    }
  }

  private async apply(wanted: WantedMending, spillPath: string, { signal, progress }: TaskContext): Promise<Mended> {
    const { revisionId, steps } = wanted;
    const told = (done: number): void => progress({ stage: 'mending', done, total: steps.length });
    told(0);
    return withRowsOf(this.parts.records, [revisionId], () =>
      this.parts.thread.mend({ revisionId, steps, spillPath }, { signal, onProgress: told }),
    );
  }

  /** Asked again inside the unit of work: the revision may have been deleted or erased while the thread was at it. */
  private async store(id: string, wanted: WantedMending, { table, effects }: Mended): Promise<void> {
    const { records, drafts, clock } = this.parts;
    const { personId, steps } = wanted;
    const base = await this.requireBase(wanted.revisionId);
    const { recordSetId, sha256, byteCount, fileName, originalPath, originalKept, reading } = base;
    await requireExpectedNewest(records, recordSetId, wanted.expectedNewest);
    const number = await records.takeNumber(recordSetId);
    const createdAt = timeText(clock);
    await records.insertRevision({
      ...{ id, recordSetId, number, sha256, byteCount, fileName, originalPath, originalKept, reading },
      ...{ appendedTo: null, appendedRowCount: null },
      rowCount: table.rowCount,
      columnCount: table.columns.length,
      mendedFrom: base.id,
      mending: { steps, changes: effects.map((effect) => effect.told) },
      createdAt,
      createdBy: personId,
    });
    await storeColumns(records, id, table);
    await records.markSetChanged(recordSetId, createdAt);
    await drafts.remove(base.id, personId);
    await this.note(wanted, base, number);
  }

  private async note({ personId, steps }: WantedMending, base: RevisionRecord, number: number): Promise<void> {
    const count = steps.length === 1 ? '1 step' : `${steps.length} steps`;
    await this.parts.journal.write({
      actorId: personId,
      action: 'record-revision-mended',
      subjectKind: 'record-set',
      subjectId: base.recordSetId,
      summary: `Revision ${number} of ${base.recordSetName} was mended from revision ${base.number} in ${count}`,
    });
  }

  private requireBase(id: string): Promise<RevisionRecord> {
    return revisionWithRows(this.parts.records, id);
  }
}
