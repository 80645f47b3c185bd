import { parentPort } from 'node:worker_threads';
import { runFoldTask, type FoldTask } from '../regression/selection/fold-task';

interface Message {
  readonly at: number;
  readonly task: FoldTask;
}

parentPort?.on('message', ({ at, task }: Message) => {
  parentPort?.postMessage({ at, answer: runFoldTask(task) });
});
