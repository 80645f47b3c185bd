import { parentPort } from 'node:worker_threads';
import type { TableMessage } from './import-task';
import type { ReadingProgress } from './reading/reading-choices';
import { TableProblem } from './reading/table-problem';

const problemOf = (error: unknown): TableMessage<never> => {
  if (!(error instanceof TableProblem)) throw error;
  const { code, detail, line } = error;
  return { kind: 'problem', code, detail, ...(line !== undefined && { line }) };
};

const say = (message: TableMessage<unknown>): void => parentPort?.postMessage(message);

/** For a worker file: one table, then it ends. What is wrong with the file is an answer; anything else ends the thread. */
export function answerFromThread<Answer>(
  work: (onProgress: (progress: ReadingProgress) => void) => Promise<Answer>,
): void {
  work((progress) => say({ kind: 'progress', progress }))
    .then((answer): TableMessage<Answer> => ({ kind: 'answer', answer }), problemOf)
    .then(say)
    .catch((error: unknown) => {
      setImmediate(() => {
        throw error;
      });
    });
}
