import { workerData } from 'node:worker_threads';
import type { ImportTask } from './import-task';
import { readTable } from './reading/read-table';
import { SpillFile } from './reading/spill-file';
import { answerFromThread } from './table-worker';

const { path, spillPath, choices, base } = workerData as ImportTask;

answerFromThread(async (onProgress) => {
  const spill = new SpillFile(spillPath, 'wx+');
  try {
    return await readTable(path, spill, { choices, base, onProgress });
  } finally {
    spill.close();
  }
});
