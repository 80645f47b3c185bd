import type { components } from '../../../openapi/types/desk';
import type { Database } from '../database/database';
import type { Page } from '../http/page';
import type { FitFailure } from './fit-task';

export type FitState = components['schemas']['FitState'];
type Progress = components['schemas']['Progress'];
type RevisionReference = components['schemas']['RevisionReference'];
type Specification = components['schemas']['Specification'];

interface FitRow {
  id: string;
  estimatorId: string;
  revisionId: string;
  /** JSON. */
  specification: string;
  state: FitState;
  stage: string;
  stageDone: number;
  stageTotal: number;
  claimedBy: string | null;
  claimedAt: string | null;
  cancelAsked: boolean | number;
  /** JSON. */
  failure: string | null;
  /** JSON. */
  result: string | null;
  /** Canonical JSON. */
  formula: string | null;
  lambda: number | null;
  effectiveDegreesOfFreedom: number | null;
  rmse: number | null;
  r2: number | null;
  createdAt: string;
  createdBy: string;
  startedAt: string | null;
  finishedAt: string | null;
}

export interface NewFit {
  readonly id: string;
  readonly estimatorId: string;
  readonly revisionId: string;
  readonly specification: Specification;
  readonly createdAt: string;
  readonly createdBy: string;
}

export interface FitRecord {
  readonly id: string;
  readonly estimatorId: string;
  readonly estimator: string;
  readonly estimatorName: string;
  readonly unit: string;
  readonly state: FitState;
  readonly progress: Progress;
  readonly specification: Specification;
  readonly revision: RevisionReference;
  readonly createdAt: string;
  readonly createdBy: { readonly id: string; readonly name: string };
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
  readonly failure: FitFailure | null;
  readonly lambda: number | null;
  readonly effectiveDegreesOfFreedom: number | null;
  readonly rmse: number | null;
  readonly r2: number | null;
}

export interface FitTexts {
  readonly result: string;
  readonly formula: string;
}

type ListedRow = Omit<FitRow, 'result' | 'formula'> & {
  slug: string;
  estimatorName: string;
  unit: string;
  createdByName: string;
  revisionNumber: number;
  sha256: string;
  rowCount: number;
  recordSetId: string;
  recordSetName: string;
};

const listedColumns = [
  'id',
  'estimatorId',
  'revisionId',
  'specification',
  'state',
  'stage',
  'stageDone',
  'stageTotal',
  'failure',
  'lambda',
]
  .concat(['effectiveDegreesOfFreedom', 'rmse', 'r2', 'createdAt', 'createdBy', 'startedAt', 'finishedAt'])
  .map((column) => `fits.${column}`);

export class FitsStore {
  constructor(private readonly database: Database) {}

  async insert(fit: NewFit): Promise<void> {
    const waiting = { state: 'queued' as const, stage: 'queued', stageDone: 0, stageTotal: 1, cancelAsked: false };
    await this.database
      .table<FitRow>('fits')
      .insert({ ...fit, specification: JSON.stringify(fit.specification), ...waiting });
  }

  async find(id: string): Promise<FitRecord | null> {
    const row = (await this.listed().where('fits.id', id).first()) as ListedRow | undefined;
    return row ? toRecord(row) : null;
  }

  async list(estimatorId: string, { limit, offset }: Page): Promise<FitRecord[]> {
    const rows = (await this.listed()
      .where({ estimatorId })
      .orderBy('fits.createdAt', 'desc')
      .orderBy('fits.id')
      .limit(limit)
      .offset(offset)) as ListedRow[];
    return rows.map(toRecord);
  }

  async count(estimatorId: string): Promise<number> {
    const row = await this.database.connection('fits').where({ estimatorId }).count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  /** Result and formula as stored; null until the fit is done. */
  async texts(id: string): Promise<FitTexts | null> {
    const row = await this.database.table<FitRow>('fits').where({ id }).first('result', 'formula');
    return row?.result && row.formula ? { result: row.result, formula: row.formula } : null;
  }

  async stateOf(id: string): Promise<{ state: FitState; progress: Progress } | null> {
    const row = await this.database
      .table<FitRow>('fits')
      .where({ id })
      .first('state', 'stage', 'stageDone', 'stageTotal');
    return row ? { state: row.state, progress: progressOf(row) } : null;
  }

  /** False when the fit was not waiting any more. */
  async cancelQueued(id: string, at: string): Promise<boolean> {
    const change = { state: 'cancelled' as const, finishedAt: at, cancelAsked: true };
    return (await this.database.table<FitRow>('fits').where({ id, state: 'queued' }).update(change)) === 1;
  }

  /** Whoever runs it sees this at its next heartbeat. */
  async askCancel(id: string): Promise<boolean> {
    return (
      (await this.database.table<FitRow>('fits').where({ id, state: 'running' }).update({ cancelAsked: true })) === 1
    );
  }

  private listed() {
    return this.database
      .connection('fits')
      .join('estimators', 'estimators.id', 'fits.estimatorId')
      .join('people', 'people.id', 'fits.createdBy')
      .join('recordRevisions', 'recordRevisions.id', 'fits.revisionId')
      .join('recordSets', 'recordSets.id', 'recordRevisions.recordSetId')
      .select(listedColumns)
      .select('estimators.slug', 'estimators.name as estimatorName', 'estimators.unit', 'people.name as createdByName')
      .select('recordRevisions.number as revisionNumber', 'recordRevisions.sha256', 'recordRevisions.rowCount')
      .select('recordRevisions.recordSetId', 'recordSets.name as recordSetName');
  }
}

const progressOf = (row: Pick<FitRow, 'stage' | 'stageDone' | 'stageTotal'>): Progress => ({
  stage: row.stage,
  done: row.stageDone,
  total: row.stageTotal,
});

function toRecord(row: ListedRow): FitRecord {
  const {
    id,
    estimatorId,
    estimatorName,
    unit,
    state,
    createdAt,
    startedAt,
    finishedAt,
    lambda,
    effectiveDegreesOfFreedom,
    rmse,
    r2,
  } = row;
  return {
    ...{ id, estimatorId, estimator: row.slug, estimatorName, unit, state, createdAt, startedAt, finishedAt },
    ...{ lambda, effectiveDegreesOfFreedom, rmse, r2 },
    progress: progressOf(row),
    specification: JSON.parse(row.specification) as Specification,
    revision: {
      id: row.revisionId,
      number: row.revisionNumber,
      sha256: row.sha256,
      rowCount: row.rowCount,
      recordSetId: row.recordSetId,
      recordSetName: row.recordSetName,
    },
    createdBy: { id: row.createdBy, name: row.createdByName },
    failure: row.failure === null ? null : (JSON.parse(row.failure) as FitFailure),
  };
}
