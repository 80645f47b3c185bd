import { parentPort, workerData } from 'node:worker_threads';
import type { ImportOutcome, ImportTask } from './import-task';
import { readTable } from './reading/read-table';
import { SpillFile } from './reading/spill-file';
import { TableProblem } from './reading/table-problem';

async function read({ path, spillPath }: ImportTask): Promise<ImportOutcome> {
  const spill = new SpillFile(spillPath, 'wx+');
  try {
    return { kind: 'read', reading: await readTable(path, spill) };
  } finally {
    spill.close();
  }
}

/** Runs in a worker thread: one file, then it ends. What is wrong with the file is an answer; anything else ends the thread. */
read(workerData as ImportTask)
  .catch((error: unknown): ImportOutcome => {
    if (!(error instanceof TableProblem)) throw error;
    return {
      kind: 'problem',
      code: error.code,
      detail: error.detail,
      ...(error.line !== undefined && { line: error.line }),
    };
  })
  .then((outcome) => parentPort?.postMessage(outcome))
  .catch((error: unknown) => {
    setImmediate(() => {
      throw error;
    });
  });
