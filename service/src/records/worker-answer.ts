import { Worker } from 'node:worker_threads';
import { DeskError } from '../errors';

export interface ThreadWatch<Progress> {
  /** Aborted: the thread is ended, and with it whatever it was at. */
  readonly signal?: AbortSignal;
  readonly onProgress?: (progress: Progress) => void;
}

/** What a worker posts on the way to its answer. */
export interface ProgressMessage<Progress> {
  readonly progress: Progress;
}

const isProgress = <Progress>(message: unknown): message is ProgressMessage<Progress> =>
  typeof message === 'object' && message !== null && Object.keys(message).join() === 'progress';

/** A thread that runs out of memory ends alone: the table is too large for what was asked, and that is told. */
function translate(error: unknown): unknown {
  if ((error as { readonly code?: unknown }).code !== 'ERR_WORKER_OUT_OF_MEMORY') return error;
  const detail =
    'This needs more memory than the service has. Try it on a revision with fewer rows or columns, or ask whoever runs the service for more memory.';
  return new DeskError('unavailable', detail, { cause: error });
}

/**
 * Runs a worker file with one task in a thread of its own and gives the answer that it posts, before which it may post
 * `ProgressMessage`s. Throws the signal's reason when that is aborted first.
 */
export async function answerOfThread<Answer, Progress = never>(
  path: string,
  task: object,
  nodeArguments: readonly string[],
  { signal, onProgress }: ThreadWatch<Progress> = {},
): Promise<Answer> {
  signal?.throwIfAborted();
  const worker = new Worker(path, { workerData: task, execArgv: [...nodeArguments] });
  const watch = new AbortController();
  try {
    return await new Promise<Answer>((resolve, reject) => {
      worker.on('message', (message: Answer | ProgressMessage<Progress>) =>
        isProgress<Progress>(message) ? onProgress?.(message.progress) : resolve(message),
      );
      worker.once('error', (error) => reject(translate(error)));
      worker.once('exit', () => reject(new Error('The thread ended without an answer.')));
      signal?.addEventListener('abort', () => reject(signal.reason as Error), { signal: watch.signal });
    });
  } finally {
    watch.abort();
    await worker.terminate();
  }
}
