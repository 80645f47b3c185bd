import { Worker } from 'node:worker_threads';

/** Runs a worker file with one task in a thread of its own and gives the one message that it answers with. */
export async function answerOfThread<Answer>(
  path: string,
  task: object,
  nodeArguments: readonly string[],
): Promise<Answer> {
  const worker = new Worker(path, { workerData: task, execArgv: [...nodeArguments] });
  try {
    return await new Promise<Answer>((resolve, reject) => {
      worker.once('message', resolve);
      worker.once('error', reject);
      worker.once('exit', () => reject(new Error('The thread ended without an answer.')));
    });
  } finally {
    await worker.terminate();
  }
}
