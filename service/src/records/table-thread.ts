import { Worker } from 'node:worker_threads';
import { DeskError } from '../errors';
import { ProgressThrottle } from '../fits/progress-throttle';
import type { ProposalTask, TableMessage } from './import-task';
import type { ReadingProgress } from './reading/reading-choices';

export interface TableThreadOptions {
  /** Node's own arguments for the thread; tests name the hook that reads TypeScript. */
  readonly nodeArguments: readonly string[];
  /** Stops the thread. */
  readonly signal?: AbortSignal;
  /** Told how far the reading has come, a few times a second. */
  readonly onProgress?: (progress: ReadingProgress) => void;
}

/** Heap of the thread: a table that needs more is refused, instead of the service running out of memory. */
const threadHeapMegabytes = 512;
const progressEveryMs = 200;

/** The thread's heap is bounded; what does not fit is the file's fault, not the service's. */
function translate(error: unknown): unknown {
  if ((error as { code?: unknown }).code !== 'ERR_WORKER_OUT_OF_MEMORY') return error;
  const detail =
    'The table holds more than can be read at once. Leave out long text columns, send it in parts, or save a workbook as “CSV UTF-8”.';
  return new DeskError('file-too-large', detail, { cause: error });
}

const stopped = (): DeskError => new DeskError('body-unreadable', 'The upload was broken off. Send the file again.');

function answerOf<Answer>(worker: Worker, { signal, onProgress }: TableThreadOptions): Promise<Answer> {
  const throttle = new ProgressThrottle<ReadingProgress>(progressEveryMs, (progress) => onProgress?.(progress));
  return new Promise<Answer>((resolve, reject) => {
    const stop = (): void => {
      void worker.terminate();
      reject(stopped());
    };
    signal?.addEventListener('abort', stop, { once: true });
    worker.on('message', (message: TableMessage<Answer>) => {
      if (message.kind === 'progress') throttle.offer(message.progress);
      else if (message.kind === 'answer') resolve(message.answer);
      else reject(new DeskError(message.code, message.detail, { line: message.line }));
    });
    worker.once('error', (error) => reject(translate(error)));
    worker.once('exit', () => {
      signal?.removeEventListener('abort', stop);
      reject(new Error('The reading thread ended without an answer.'));
    });
    if (signal?.aborted) stop();
  }).finally(() => throttle.stop());
}

/** Runs a worker file on one table in a thread of its own; the file's problems come as our errors, with the line. */
export async function runTableThread<Answer>(
  workerPath: string,
  task: ProposalTask,
  options: TableThreadOptions,
): Promise<Answer> {
  const worker = new Worker(workerPath, {
    workerData: task,
    execArgv: [...options.nodeArguments],
    resourceLimits: { maxOldGenerationSizeMb: threadHeapMegabytes },
  });
  try {
    return await answerOf<Answer>(worker, options);
  } finally {
    await worker.terminate();
  }
}
