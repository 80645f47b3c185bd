import { parentPort, workerData } from 'node:worker_threads';
import { readRecordTable, RecordsMissingError } from '../records/record-table-reader';
import { RegressionError } from '../regression/errors';
import { fitRecords } from '../regression/fit';
import { canonicalJson } from './canonical-json';
import { columnsOf, toEngineSpecification } from './engine-specification';
import type { FitMessage, FitOutcome, FitTask } from './fit-task';
import { FoldPool, threadsForFolds } from './fold-pool';
import { publishedResult } from './published-result';

const say = (message: FitMessage): void => parentPort?.postMessage(message);

const tell = (stage: string, done: number, total: number): void =>
  say({ kind: 'progress', progress: { stage, done: Math.round(done), total: Math.round(total) } });

function poolFor(task: FitTask, rowCount: number): FoldPool | null {
  const { inputs, validation } = task.specification;
  const threads = threadsForFolds({ rowCount, inputCount: inputs.length, folds: validation?.folds ?? 10 });
  return threads === 1 ? null : new FoldPool({ threads, onAnswered: (done, total) => tell('validation', done, total) });
}

/** The same bits with threads for the folds as without. */
async function fit(task: FitTask): ReturnType<typeof fitRecords> {
  const records = await readRecordTable(task.databasePath, task.revisionId, columnsOf(task.specification));
  const pool = poolFor(task, records.rowCount);
  try {
    return await fitRecords(records, toEngineSpecification(task.specification), {
      onProgress: ({ stage, done, total }) => tell(stage, done, total),
      ...(pool && { runFolds: pool.run }),
    });
  } finally {
    await pool?.close();
  }
}

async function compute(task: FitTask): Promise<FitOutcome> {
  const { result, formula } = await fit(task);
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

/** What went wrong as an answer: a refusal of the engine, or that the rows were erased while the fit waited or began. */
function failureOf(error: unknown): FitOutcome {
  if (error instanceof RegressionError)
    return { kind: 'failed', failure: { code: error.code, message: error.message, column: error.column } };
  if (!(error instanceof RecordsMissingError)) throw error;
  const message =
    'The rows of this revision are not there any more: they were erased at their retention date, or the revision was deleted. Choose another revision, or bring the records in again if you still may keep them.';
  return { kind: 'failed', failure: { code: 'records-erased', message, column: null } };
}

/** Runs in a worker thread: one fit, then it ends. Anything but an answer ends the thread. */
compute(workerData as FitTask)
  .catch(failureOf)
  .then(say)
  .catch((error: unknown) => {
    setImmediate(() => {
      throw error;
    });
  });
