import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { answerOfThread } from './worker-answer';

describe('the answer of a thread', () => {
  const folder = mkdtempSync(join(tmpdir(), 'tarebeam-worker-'));
  afterAll(() => rmSync(folder, { recursive: true }));
  let written = 0;
  const worker = (source: string): string => {
    const path = join(folder, `worker-${++written}.js`);
    writeFileSync(path, `const { parentPort, workerData } = require('node:worker_threads');\n${source}`);
    return path;
  };

  it('comes after its progress, each in order', async () => {
    const path = worker(
      'for (const progress of [1, 2]) parentPort.postMessage({ progress });\nparentPort.postMessage({ sum: workerData.a });',
    );
    const told: number[] = [];
    const answer = await answerOfThread(path, { a: 3 }, [], { onProgress: (done: number) => void told.push(done) });
    expect([told, answer]).toEqual([[1, 2], { sum: 3 }]);
  });

  it('is the signal’s reason when that is aborted, and the thread is ended', async () => {
    const path = worker('parentPort.postMessage({ progress: 1 });\nsetInterval(() => undefined, 1000);');
    const controller = new AbortController();
    const ended = jest.spyOn(Worker.prototype, 'terminate');
    const reason = new Error('gone');
    const waiting = answerOfThread(path, {}, [], {
      signal: controller.signal,
      onProgress: () => controller.abort(reason),
    });
    await expect(waiting).rejects.toBe(reason);
    expect(ended).toHaveBeenCalledTimes(1);
    ended.mockRestore();
  });

  it('says that there was not enough memory when there was not', async () => {
    const path = worker("throw Object.assign(new Error('heap'), { code: 'ERR_WORKER_OUT_OF_MEMORY' });");
    await expect(answerOfThread(path, {}, [])).rejects.toMatchObject({
      code: 'unavailable',
      detail: expect.stringContaining('fewer rows or columns'),
    });
  });

  it('is never begun when the signal is aborted already', async () => {
    const reason = new Error('gone');
    await expect(answerOfThread(join(folder, 'none.js'), {}, [], { signal: AbortSignal.abort(reason) })).rejects.toBe(
      reason,
    );
  });

  it('fails with what the thread threw, or when it says nothing', async () => {
    await expect(answerOfThread(worker('throw new Error("broken");'), {}, [])).rejects.toThrow('broken');
    await expect(answerOfThread(worker(''), {}, [])).rejects.toThrow('without an answer');
  });
});
