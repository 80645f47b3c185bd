import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { FoldAnswer, FoldTask } from '../../service/src/regression/selection/fold-task';

interface Message {
  readonly at: number;
  readonly answer: FoldAnswer;
}

/** Runs fold tasks on a few threads; answers come back in the order of the tasks. */
export class FoldPool {
  private readonly workers: Worker[];

  constructor(threads: number) {
    this.workers = Array.from({ length: threads }, () => new Worker(join(__dirname, 'fold-worker.js')));
  }

  readonly run = (tasks: readonly FoldTask[]): Promise<readonly FoldAnswer[]> =>
    new Promise((resolve, reject) => {
      const answers = new Array<FoldAnswer>(tasks.length);
      let next = 0;
      let left = tasks.length;
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
          left -= 1;
          if (left === 0) resolve(answers);
          else give(worker);
        });
        give(worker);
      }
    });

  async close(): Promise<void> {
    await Promise.all(this.workers.map((worker) => worker.terminate()));
  }
}
