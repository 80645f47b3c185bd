import { parentPort, workerData } from 'node:worker_threads';
import { SpillFile } from '../reading/spill-file';
import { readRecordTable } from '../record-table-reader';
import type { ProgressMessage } from '../worker-answer';
import { applySteps, StepProblem } from './apply-steps';
import { finishTable } from './finish-table';
import type { MendOutcome, MendTask, StepsDone } from './mend-task';

const tell = (progress: StepsDone): void => {
  const message: ProgressMessage<StepsDone> = { progress };
  parentPort?.postMessage(message);
};

function mend({ databasePath, revisionId, steps, spillPath }: MendTask): MendOutcome {
  const spill = new SpillFile(spillPath, 'wx+');
  try {
    const { table, effects } = applySteps(readRecordTable(databasePath, revisionId), steps, tell);
    return { kind: 'mended', table: finishTable(table, spill), effects };
  } catch (error) {
    if (error instanceof StepProblem) return { kind: 'problem', step: error.step, message: error.message };
    throw error;
  } finally {
    spill.close();
  }
}

/** Runs in a worker thread: one revision, then it ends. A step that cannot be done is an answer. */
parentPort?.postMessage(mend(workerData as MendTask));
