import { rm } from 'node:fs/promises';
import { extname, join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { Logger } from 'pino';
import { DeskError } from '../../errors';
import type { SpilledTable } from '../store-columns';
import type { TaskProgress } from '../tasks/record-tasks-store';
import type { StorageMessage, StorageTask, StorageWork } from './storage-task';

export interface CellStorageParts {
  readonly databasePath: string;
  /** Node's own arguments for the storing thread; none when compiled. */
  readonly threadArguments: readonly string[];
  readonly log: Pick<Logger, 'error'>;
}

export interface StoringOptions {
  /** Stops storing within one short transaction; what was stored stays until it is cleared. */
  readonly signal?: AbortSignal;
  readonly onProgress?: (progress: TaskProgress) => void;
}

export interface CellsToStore {
  readonly revisionId: string;
  readonly table: SpilledTable;
  readonly spillPath: string;
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `storage-worker${extname(__filename)}`);

/** Work that has said nothing for so long has died with its process. */
const silentMs = 60 * 60 * 1000;

/**
 * Writes and removes the cells of revisions in a thread of its own, in many short transactions, since one commit of
 * a large table would hold up everything else for seconds.
 */
export class CellStorage {
  constructor(private readonly parts: CellStorageParts) {}

  /**
   * Stores a revision's cells before its row exists: `storeColumns` then checks that they are all there, inside the
   * unit of work that inserts the row. When that or this fails, call `clearFailed`; `storeFor` does all of it.
   */
  async storeAhead(
    revisionId: string,
    { columns, blockRowCounts, stored }: SpilledTable,
    spillPath: string,
    options: StoringOptions = {},
  ): Promise<void> {
    const places = columns.map(({ position, blocks }) => ({ position, blocks }));
    await this.run(
      { kind: 'store', revisionId, table: { columns: places, blockRowCounts, stored }, spillPath },
      options,
    );
  }

  /**
   * Stores the cells ahead, then does the unit of work that needs them; when either fails, the cells are cleared. The
   * spill file goes before them: on a full disk, cells can only be cleared in the room that it leaves.
   */
  async storeFor(
    { revisionId, table, spillPath }: CellsToStore,
    work: () => Promise<void>,
    options: StoringOptions = {},
  ): Promise<void> {
    try {
      await this.storeAhead(revisionId, table, spillPath, options);
      await work();
    } catch (error) {
      await rm(spillPath, { force: true });
      await this.clearFailed(revisionId);
      throw error;
    }
  }

  /** Removes every cell of a revision. */
  async clear(revisionId: string): Promise<void> {
    await this.run({ kind: 'clear', revisionId }, {});
  }

  /** As `clear`, after something has failed, which is what counts: what cannot be cleared now is swept. */
  async clearFailed(revisionId: string): Promise<void> {
    try {
      await this.clear(revisionId);
    } catch (error) {
      this.parts.log.error({ err: error, revisionId }, 'cells could not be cleared');
    }
  }

  /** Removes cells that a process left behind when it was killed. */
  async sweep(now: Date): Promise<void> {
    await this.run({ kind: 'sweep', silentBefore: new Date(now.getTime() - silentMs).toISOString() }, {});
  }

  private async run(work: StorageWork, options: StoringOptions): Promise<void> {
    const { databasePath, threadArguments } = this.parts;
    const task: StorageTask = { databasePath, work, stop: new SharedArrayBuffer(4) };
    const stop = (): void => void Atomics.store(new Int32Array(task.stop), 0, 1);
    options.signal?.addEventListener('abort', stop, { once: true });
    if (options.signal?.aborted) stop();
    const worker = new Worker(workerPath, { workerData: task, execArgv: [...threadArguments] });
    try {
      if ((await endOf(worker, options)) === 'stopped') throw cancelled();
    } finally {
      options.signal?.removeEventListener('abort', stop);
      await worker.terminate();
    }
  }
}

/** Waits for the thread to leave by itself, so that its connection is closed in order. */
function endOf(worker: Worker, { onProgress }: StoringOptions): Promise<'done' | 'stopped'> {
  return new Promise((resolve, reject) => {
    let end: 'done' | 'stopped' | undefined;
    worker.on('message', (message: StorageMessage) => {
      if (message.kind !== 'progress') end = message.kind;
      else onProgress?.({ stage: 'storing', done: message.done, total: message.total });
    });
    worker.once('error', reject);
    worker.once('exit', () => (end ? resolve(end) : reject(new Error('The storing thread ended without an answer.'))));
  });
}

const cancelled = (): DeskError =>
  new DeskError('body-unreadable', 'Storing was cancelled before its end. Nothing was kept; send the file again.');
