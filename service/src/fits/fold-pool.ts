import { availableParallelism } from 'node:os';
import { extname, join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { FoldAnswer, FoldTask } from '../regression/selection/fold-task';

interface Message {
  readonly at: number;
  readonly answer: FoldAnswer;
}

export interface FoldPoolOptions {
  readonly threads: number;
  /** Told after every piece of a batch. */
  readonly onAnswered?: (done: number, total: number) => void;
  /** Node's own arguments for the threads; those of the thread that opens the pool when absent. */
  readonly nodeArguments?: readonly string[];
}

/** Cells from which the folds are worth threads of their own; below, starting threads takes longer than the fit. */
const cellsWorthThreads = 250_000;
/** Order of the square matrices from which another thread's copies cost more memory than its time is worth. */
const largestSharedOrder = 1_500;

export interface FoldWork {
  readonly rowCount: number;
  readonly inputCount: number;
  readonly folds: number;
}

/** How many threads a fit's folds deserve; 1 means none beside the fit's own. */
export function threadsForFolds({ rowCount, inputCount, folds }: FoldWork): number {
  if (rowCount * inputCount < cellsWorthThreads) return 1;
  if (Math.min(rowCount, inputCount) > largestSharedOrder) return 1;
  return Math.min(availableParallelism(), folds);
}

const workerPath = join(__dirname, `fold-worker${extname(__filename)}`);

/** Runs a fit's independent pieces on a few threads; answers come back in the order of the tasks. */
export class FoldPool {
  private readonly workers: Worker[];

  constructor(private readonly options: FoldPoolOptions) {
    const { threads, nodeArguments = process.execArgv } = options;
    this.workers = Array.from({ length: threads }, () => new Worker(workerPath, { execArgv: [...nodeArguments] }));
  }

  readonly run = (tasks: readonly FoldTask[]): Promise<readonly FoldAnswer[]> =>
    new Promise((resolve, reject) => {
      const answers = new Array<FoldAnswer>(tasks.length);
      let next = 0;
      let done = 0;
      if (tasks.length === 0) resolve(answers);
      const give = (worker: Worker): void => {
        if (next >= tasks.length) return;
        worker.postMessage({ at: next, task: tasks[next] });
        next += 1;
      };
      for (const worker of this.workers) {
        worker.removeAllListeners();
        worker.on('error', reject);
        worker.on('message', ({ at, answer }: Message) => {
          answers[at] = answer;
          done += 1;
          this.options.onAnswered?.(done, tasks.length);
          if (done === tasks.length) resolve(answers);
          else give(worker);
        });
        give(worker);
      }
    });

  async close(): Promise<void> {
    await Promise.all(this.workers.map((worker) => worker.terminate()));
  }
}
