import { extname, join } from 'node:path';
import type { ProposalTask } from './import-task';
import type { ProposedReading } from './reading/propose-reading';
import { runTableThread, type TableThreadOptions } from './table-thread';

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `proposal-worker${extname(__filename)}`);

/** Finds out in a thread of its own how a file would be read. */
export const proposeInThread = (task: ProposalTask, options: TableThreadOptions): Promise<ProposedReading> =>
  runTableThread<ProposedReading>(workerPath, task, options);
