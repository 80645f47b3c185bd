import { parentPort, workerData } from 'node:worker_threads';
import { SpillFile } from '../reading/spill-file';
import { readRecordTable } from '../record-table-reader';
import { applySteps, StepProblem } from './apply-steps';
import { finishTable } from './finish-table';
import type { MendOutcome, MendTask } from './mend-task';

function mend({ databasePath, revisionId, steps, spillPath }: MendTask): MendOutcome {
  const spill = new SpillFile(spillPath, 'wx+');
  try {
    const { table, changes } = applySteps(readRecordTable(databasePath, revisionId), steps);
    return { kind: 'mended', table: finishTable(table, spill), changes };
  } catch (error) {
    if (error instanceof StepProblem) return { kind: 'problem', step: error.step, message: error.message };
    throw error;
  } finally {
    spill.close();
  }
}

/** Runs in a worker thread: one revision, then it ends. A step that cannot be done is an answer. */
parentPort?.postMessage(mend(workerData as MendTask));
