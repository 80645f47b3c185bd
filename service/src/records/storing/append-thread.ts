import { extname, join } from 'node:path';
import type { FinishedTable } from '../mending/finish-table';
import type { TaskProgress } from '../tasks/record-tasks-store';
import { answerOfThread, type ThreadWatch } from '../worker-answer';
import type { AppendTask } from './append-task';

export interface AppendOptions extends ThreadWatch<TaskProgress> {
  /** Node's own arguments for the thread; none when compiled. */
  readonly nodeArguments: readonly string[];
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `append-worker${extname(__filename)}`);

/**
 * Puts a revision's rows and the rows of a reading together in a thread of its own. The cells of all rows come to lie
 * in the task's spill file, which the caller removes, ready for `CellStorage`.
 */
export const appendInThread = (task: AppendTask, { nodeArguments, ...watch }: AppendOptions): Promise<FinishedTable> =>
  answerOfThread<FinishedTable, TaskProgress>(workerPath, task, nodeArguments, watch);
