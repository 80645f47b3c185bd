import type { components } from '../../../openapi/types/desk';
import type { Database } from '../database/database';
import type { FinishedColumns, FitFailure } from './fit-task';

type Progress = components['schemas']['Progress'];
type Specification = components['schemas']['Specification'];

/** A fit that may be taken: waiting, or left by a process that says nothing any more. */
export interface ClaimableFit {
  readonly id: string;
  readonly state: 'queued' | 'running';
  readonly claimedBy: string | null;
  readonly claimedAt: string | null;
}

export interface QueuedFit {
  readonly id: string;
  readonly revisionId: string;
  readonly specification: Specification;
  readonly createdBy: string;
}

interface FitColumns extends FinishedColumns {
  id: string;
  revisionId: string;
  specification: string;
  state: string;
  stage: string;
  stageDone: number;
  stageTotal: number;
  claimedBy: string | null;
  claimedAt: string | null;
  cancelAsked: boolean | number;
  failure: string | null;
  createdAt: string;
  createdBy: string;
  startedAt: string | null;
  finishedAt: string | null;
}

/** The queue of fits in the database. Every change is conditional, so that several processes may share it. */
export class FitQueueStore {
  constructor(private readonly database: Database) {}

  /** Oldest first. */
  async claimable(): Promise<ClaimableFit[]> {
    const rows = await this.table()
      .whereIn('state', ['queued', 'running'])
      .orderBy('createdAt')
      .orderBy('id')
      .select('id', 'state', 'claimedBy', 'claimedAt');
    return rows as ClaimableFit[];
  }

  /** What the fit's estimator is called, for the journal. */
  async estimatorNameOf(id: string): Promise<string> {
    const row = await this.database
      .connection('fits')
      .join('estimators', 'estimators.id', 'fits.estimatorId')
      .where({ 'fits.id': id })
      .first('estimators.name');
    return String(row?.name ?? 'an estimator');
  }

  /** True for the one process whose claim was first; the fit then runs from its beginning. */
  async claim(fit: ClaimableFit, claimedBy: string, at: string): Promise<boolean> {
    const { id, state } = fit;
    const running = {
      state: 'running',
      claimedBy,
      claimedAt: at,
      startedAt: at,
      stage: 'reading',
      stageDone: 0,
      stageTotal: 1,
    };
    const untouched = { id, state, claimedBy: fit.claimedBy, claimedAt: fit.claimedAt };
    return (await this.table().where(untouched).update(running)) === 1;
  }

  async read(id: string): Promise<QueuedFit | null> {
    const row = await this.table().where({ id }).first('id', 'revisionId', 'specification', 'createdBy');
    return row ? { ...row, specification: JSON.parse(row.specification) as Specification } : null;
  }

  /** Says that the fit is still being run; tells whether to go on. */
  async beat(id: string, claimedBy: string, at: string): Promise<'go-on' | 'cancel' | 'lost'> {
    const kept = await this.running(id, claimedBy).update({ claimedAt: at });
    if (kept === 0) return 'lost';
    const row = await this.table().where({ id }).first('cancelAsked');
    return row?.cancelAsked ? 'cancel' : 'go-on';
  }

  async saveProgress(id: string, claimedBy: string, progress: Progress): Promise<void> {
    await this.running(id, claimedBy).update({
      stage: progress.stage,
      stageDone: progress.done,
      stageTotal: progress.total,
    });
  }

  async finish(
    id: string,
    claimedBy: string,
    finished: FinishedColumns & { readonly finishedAt: string },
  ): Promise<boolean> {
    const change = {
      ...finished,
      state: 'done',
      stage: 'done',
      stageDone: 1,
      stageTotal: 1,
      claimedBy: null,
      claimedAt: null,
    };
    return (await this.running(id, claimedBy).update(change)) === 1;
  }

  async fail(id: string, claimedBy: string, failure: FitFailure, at: string): Promise<boolean> {
    const change = {
      state: 'failed',
      failure: JSON.stringify(failure),
      finishedAt: at,
      claimedBy: null,
      claimedAt: null,
    };
    return (await this.running(id, claimedBy).update(change)) === 1;
  }

  async cancel(id: string, claimedBy: string, at: string): Promise<boolean> {
    const change = { state: 'cancelled', finishedAt: at, claimedBy: null, claimedAt: null };
    return (await this.running(id, claimedBy).update(change)) === 1;
  }

  /** Back into the queue: the process ends before the fit does. */
  async release(id: string, claimedBy: string): Promise<void> {
    await this.running(id, claimedBy).update({
      state: 'queued',
      stage: 'queued',
      stageDone: 0,
      stageTotal: 1,
      claimedBy: null,
      claimedAt: null,
      startedAt: null,
    });
  }

  private table() {
    return this.database.table<FitColumns>('fits');
  }

  private running(id: string, claimedBy: string) {
    return this.table().where({ id, claimedBy, state: 'running' });
  }
}
