import { workerData } from 'node:worker_threads';
import type { ImportTask } from './import-task';
import { readTable } from './reading/read-table';
import { SpillFile } from './reading/spill-file';
import { StoringCompanion } from './storing/storing-companion';
import { answerFromThread } from './table-worker';

const { path, spillPath, choices, base, ahead } = workerData as ImportTask;

answerFromThread(async (onProgress) => {
  const companion = ahead && new StoringCompanion(ahead, spillPath);
  const spill = new SpillFile(spillPath, 'wx+', companion?.add);
  try {
    const reading = await readTable(path, spill, { choices, base, onProgress });
    return { ...reading, stored: await companion?.end() };
  } finally {
    spill.close();
  }
});
