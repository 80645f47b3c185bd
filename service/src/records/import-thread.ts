import { extname, join } from 'node:path';
import type { ImportTask } from './import-task';
import type { TableReading } from './reading/read-table';
import type { SpilledTable } from './store-columns';
import { runTableThread, type TableThreadOptions } from './table-thread';

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `import-worker${extname(__filename)}`);

/** Reads a file into columns in a thread of its own; its problems come as our errors, with the line. */
export const readTableInThread = (
  task: ImportTask,
  options: TableThreadOptions,
): Promise<TableReading & Pick<SpilledTable, 'stored'>> =>
  runTableThread<TableReading & Pick<SpilledTable, 'stored'>>(workerPath, task, options);
