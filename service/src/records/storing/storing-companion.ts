import { once } from 'node:events';
import { extname, join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { SpilledBlock } from '../reading/spill-file';
import type { StoredBlock } from '../store-columns';
import { transactionBytes } from './block-table';
import type { FollowMessage, StorageTask } from './storage-task';

/** Where the cells of a revision go that is still being read. */
export interface AheadOfReading {
  readonly databasePath: string;
  readonly revisionId: string;
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `storage-worker${extname(__filename)}`);

/**
 * Stores blocks of numbers, in a thread that a reading thread starts beside itself, while the rest of the file is
 * still being read: the disk works meanwhile instead of afterwards. Small tables never start it. Blocks lie under
 * their column's position in the file; `BlockTable.store` puts right what turned out to be something else.
 */
export class StoringCompanion {
  private readonly stored: StoredBlock[] = [];
  private waiting: SpilledBlock[] = [];
  private waitingBytes = 0;
  private thread: { readonly worker: Worker; readonly end: Promise<unknown> } | null = null;

  constructor(
    private readonly ahead: AheadOfReading,
    private readonly spillPath: string,
  ) {}

  readonly add = (block: SpilledBlock): void => {
    this.waiting.push(block);
    this.waitingBytes += block.length;
    if (this.waitingBytes < transactionBytes) return;
    this.thread ??= this.start();
    this.tell({ kind: 'blocks', blocks: this.waiting });
    for (const { position, block, offset } of this.waiting) this.stored.push({ position, block, offset });
    this.waiting = [];
    this.waitingBytes = 0;
  };

  /** Waits for what was told to be stored, and answers with it. Throws what went wrong in the thread. */
  async end(): Promise<readonly StoredBlock[]> {
    if (!this.thread) return [];
    this.tell({ kind: 'end' });
    await this.thread.end;
    return this.stored;
  }

  private tell(message: FollowMessage): void {
    this.thread?.worker.postMessage(message);
  }

  private start(): NonNullable<StoringCompanion['thread']> {
    const { databasePath, revisionId } = this.ahead;
    const task: StorageTask = {
      databasePath,
      work: { kind: 'follow', revisionId, spillPath: this.spillPath },
      stop: new SharedArrayBuffer(4),
    };
    // Node's own arguments are those of the reading thread.
    const worker = new Worker(workerPath, { workerData: task });
    const end = once(worker, 'exit');
    end.catch(() => undefined);
    return { worker, end };
  }
}
