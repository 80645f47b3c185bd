import { parentPort, workerData } from 'node:worker_threads';
import { readRecordTable } from '../records/record-table-reader';
import { RegressionError } from '../regression/errors';
import { fitRecords } from '../regression/fit';
import { canonicalJson } from './canonical-json';
import { columnsOf, toEngineSpecification } from './engine-specification';
import type { FitMessage, FitOutcome, FitTask } from './fit-task';
import { publishedResult } from './published-result';

const say = (message: FitMessage): void => parentPort?.postMessage(message);

async function compute(task: FitTask): Promise<FitOutcome> {
  const records = await readRecordTable(task.databasePath, task.revisionId, columnsOf(task.specification));
  const { result, formula } = await fitRecords(records, toEngineSpecification(task.specification), {
    onProgress: ({ stage, done, total }) =>
      say({ kind: 'progress', progress: { stage, done: Math.round(done), total: Math.round(total) } }),
  });
  const { penalty, accuracy } = result;
  return {
    kind: 'done',
    finished: {
      result: JSON.stringify(publishedResult(result, formula)),
      formula: canonicalJson(formula),
      lambda: penalty.lambda,
      effectiveDegreesOfFreedom: penalty.effectiveDegreesOfFreedom,
      rmse: accuracy.rmse,
      r2: accuracy.r2,
    },
  };
}

/** Runs in a worker thread: one fit, then it ends. A refusal of the engine is an answer; anything else ends the thread. */
compute(workerData as FitTask)
  .catch((error: unknown): FitOutcome => {
    if (!(error instanceof RegressionError)) throw error;
    return { kind: 'failed', failure: { code: error.code, message: error.message, column: error.column } };
  })
  .then(say)
  .catch((error: unknown) => {
    setImmediate(() => {
      throw error;
    });
  });
