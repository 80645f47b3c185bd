import { extname, join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { FitMessage, FitOutcome, FitTask } from './fit-task';

/** `terminated`: the thread was stopped, or ended by itself without a word. */
export type ThreadOutcome = FitOutcome | { readonly kind: 'terminated' };

export interface FitThread {
  /** Rejects when the thread breaks. */
  readonly outcome: Promise<ThreadOutcome>;
  stop(): Promise<void>;
}

type FitProgressMessage = Extract<FitMessage, { readonly kind: 'progress' }>;

export interface FitThreadOptions {
  readonly onProgress: (progress: FitProgressMessage['progress']) => void;
  /** Node's own arguments for the thread; tests name the hook that reads TypeScript. */
  readonly nodeArguments: readonly string[];
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `fit-worker${extname(__filename)}`);

/** Starts one fit in a thread of its own, so that stopping it is ending the thread. */
export function startFitThread(task: FitTask, options: FitThreadOptions): FitThread {
  const worker = new Worker(workerPath, { workerData: task, execArgv: [...options.nodeArguments] });
  const outcome = new Promise<ThreadOutcome>((resolve, reject) => {
    worker.on('message', (message: FitMessage) => {
      if (message.kind === 'progress') options.onProgress(message.progress);
      else resolve(message);
    });
    worker.once('error', reject);
    worker.once('exit', () => resolve({ kind: 'terminated' }));
  });
  return {
    outcome,
    stop: async () => {
      await worker.terminate();
    },
  };
}
