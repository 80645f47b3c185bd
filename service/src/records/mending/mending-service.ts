import { extname, join } from 'node:path';
import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import type { Database } from '../../database/database';
import { DeskError, notFound } from '../../errors';
import type { Journal } from '../../journal/journal';
import type { KeptFiles } from '../kept-files';
import type { RecordsStore, RevisionRecord } from '../records-store';
import { storeColumns } from '../store-columns';
import type { CellStorage } from '../storing/cell-storage';
import type { RecordTasks, TaskContext, TaskWork } from '../tasks/record-tasks';
import { answerOfThread } from '../worker-answer';
import type { MendStep } from './apply-steps';
import type { MendOutcome, MendTask } from './mend-task';

export interface MendingParts {
  readonly database: Database;
  readonly databasePath: string;
  readonly records: RecordsStore;
  readonly files: KeptFiles;
  readonly cells: CellStorage;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly tasks: RecordTasks;
  /** Node's own arguments for the mending thread; none when compiled. */
  readonly threadArguments: readonly string[];
}

type Mended = Extract<MendOutcome, { kind: 'mended' }>;

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `mend-worker${extname(__filename)}`);

export class MendingService {
  constructor(private readonly parts: MendingParts) {}

  /** Begins a new revision of the same set, made from this one by steps that are kept with it. */
  async mend(
    personId: string,
    revisionId: string,
    steps: readonly MendStep[],
  ): Promise<components['schemas']['RecordTask']> {
    return this.parts.tasks.start(await this.workOf(personId, revisionId, steps));
  }

  /** The same, to its end: the new revision's id. */
  async mendToEnd(personId: string, revisionId: string, steps: readonly MendStep[]): Promise<string> {
    return this.parts.tasks.finish(await this.workOf(personId, revisionId, steps));
  }

  private async workOf(personId: string, revisionId: string, steps: readonly MendStep[]): Promise<TaskWork> {
    const base = await this.parts.records.findRevision(revisionId);
    if (!base) throw notFound('revision');
    return { kind: 'mend', personId, run: (context) => this.make({ base, steps, personId }, context) };
  }

  private async make(
    { base, steps, personId }: Pick<NewMending, 'base' | 'steps' | 'personId'>,
    context: TaskContext,
  ): Promise<{ readonly recordSetId: string }> {
    const { files, cells, database, databasePath } = this.parts;
    const spillPath = files.newSpillPath();
    try {
      context.progress({ stage: 'mending', done: 0, total: steps.length });
      const mended = await this.apply({ databasePath, revisionId: base.id, steps, spillPath });
      const id = context.revisionId;
      const keep = (): Promise<void> => database.unitOfWork(() => this.store({ id, base, steps, personId }, mended));
      await cells.storeFor({ revisionId: id, table: mended.table, spillPath }, keep, {
        signal: context.signal,
        onProgress: context.progress,
      });
      return { recordSetId: base.recordSetId };
    } finally {
      await files.remove(spillPath);
    }
  }

  private async apply(task: MendTask): Promise<Mended> {
    const outcome = await answerOfThread<MendOutcome>(workerPath, task, this.parts.threadArguments);
    if (outcome.kind === 'mended') return outcome;
    const { step, message } = outcome;
    const errors = [{ pointer: `#/steps/${step}`, detail: message }];
    throw new DeskError('request-invalid', `Mend step ${step + 1} and send the steps again: ${message}`, { errors });
  }

  private async store(made: NewMending, { table, changes }: Mended): Promise<void> {
    const { records, journal, clock } = this.parts;
    const { id, base, steps, personId } = made;
    const { recordSetId, sha256, byteCount, fileName, originalPath, originalKept, reading } = base;
    const [newest] = await records.revisionsOf([recordSetId]);
    const number = newest.number + 1;
    await records.insertRevision({
      ...{ id, recordSetId, number, sha256, byteCount, fileName, originalPath, originalKept, reading },
      ...{ appendedTo: null, appendedRowCount: null },
      rowCount: table.rowCount,
      columnCount: table.columns.length,
      mendedFrom: base.id,
      mending: { steps, changes },
      createdAt: timeText(clock),
      createdBy: personId,
    });
    await storeColumns(records, id, table);
    const summary = `Revision ${number} of ${base.recordSetName} was mended from revision ${base.number} in ${steps.length} steps`;
    await journal.write({
      actorId: personId,
      action: 'record-revision-mended',
      subjectKind: 'record-set',
      subjectId: recordSetId,
      summary,
    });
  }
}

interface NewMending {
  readonly id: string;
  readonly base: RevisionRecord;
  readonly steps: readonly MendStep[];
  readonly personId: string;
}
