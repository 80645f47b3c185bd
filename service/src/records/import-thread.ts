import { extname, join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { DeskError } from '../errors';
import type { ImportOutcome, ImportTask } from './import-task';
import type { TableReading } from './reading/read-table';

export interface ImportThreadOptions {
  /** Node's own arguments for the thread; tests name the hook that reads TypeScript. */
  readonly nodeArguments: readonly string[];
  /** Stops the thread. */
  readonly signal?: AbortSignal;
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `import-worker${extname(__filename)}`);

/** Heap of the thread: a table that needs more is refused, instead of the service running out of memory. */
const threadHeapMegabytes = 512;

/** The thread's heap is bounded; what does not fit is the file's fault, not the service's. */
function translate(error: unknown): unknown {
  if ((error as { code?: unknown }).code !== 'ERR_WORKER_OUT_OF_MEMORY') return error;
  const detail =
    'The table holds more different text than can be read at once. Leave out long text columns, or send it in parts.';
  return new DeskError('file-too-large', detail, { cause: error });
}

function outcomeOf(worker: Worker, signal?: AbortSignal): Promise<ImportOutcome> {
  return new Promise((resolve, reject) => {
    const stop = (): void => {
      void worker.terminate();
      reject(new DeskError('body-unreadable', 'The upload was broken off. Send the file again.'));
    };
    signal?.addEventListener('abort', stop, { once: true });
    worker.once('message', resolve);
    worker.once('error', (error) => reject(translate(error)));
    worker.once('exit', () => {
      signal?.removeEventListener('abort', stop);
      reject(new Error('The reading thread ended without an answer.'));
    });
    if (signal?.aborted) stop();
  });
}

/** Reads a file into columns in a thread of its own; its problems come as our errors, with the line. */
export async function readTableInThread(task: ImportTask, options: ImportThreadOptions): Promise<TableReading> {
  const worker = new Worker(workerPath, {
    workerData: task,
    execArgv: [...options.nodeArguments],
    resourceLimits: { maxOldGenerationSizeMb: threadHeapMegabytes },
  });
  try {
    const outcome = await outcomeOf(worker, options.signal);
    if (outcome.kind === 'read') return outcome.reading;
    throw new DeskError(outcome.code, outcome.detail, { line: outcome.line });
  } finally {
    await worker.terminate();
  }
}
