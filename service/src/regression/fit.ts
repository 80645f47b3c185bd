import type { Formula } from './formula/formula';
import type { RecordTable } from './records';
import type { FitResult } from './result';
import type { FoldAnswer, FoldTask } from './selection/fold-task';
import type { FitSpecification } from './specification';
import { RegressionError } from './errors';

export interface FitProgress {
  readonly stage: 'reading' | 'moments' | 'path' | 'validation' | 'diagnostics';
  readonly done: number;
  readonly total: number;
}

/** What the surroundings may lend to a fit; the numbers do not depend on it. */
export interface FitHooks {
  readonly onProgress?: (progress: FitProgress) => void;
  /** Runs independent pieces elsewhere (worker threads) with `runFoldTask`; answers come back in the order of the tasks. */
  readonly runFolds?: (tasks: readonly FoldTask[]) => Promise<readonly FoldAnswer[]>;
}

export interface FittedRecords {
  readonly result: FitResult;
  readonly formula: Formula;
}

/**
 * Fits one specification to one table of records. Pure: no clock, no files; the same records and specification give the
 * same bits. Throws RegressionError.
 */
export async function fitRecords(records: RecordTable, specification: FitSpecification, hooks: FitHooks = {}): Promise<FittedRecords> {
  hooks.onProgress?.({ stage: 'reading', done: 0, total: records.rowCount });
  throw new RegressionError('bad-specification', `The method ${specification.method} is not available yet.`);
}
