import { parentPort, workerData } from 'node:worker_threads';
import BetterSqlite3 from 'better-sqlite3';
import { SpillFile } from '../reading/spill-file';
import { BlockTable } from './block-table';
import type { FollowMessage, StorageMessage, StorageTask } from './storage-task';

const say = (message: StorageMessage): void => parentPort?.postMessage(message);

/**
 * Cells have no foreign key to their revision, whose row comes only after them, in the unit of work that makes the
 * revision whole. `synchronous = NORMAL` loses no kept revision in a power cut: the commit of its row, with `FULL`,
 * makes the whole WAL durable up to itself.
 */
function openConnection(databasePath: string): BetterSqlite3.Database {
  const connection = new BetterSqlite3(databasePath, { fileMustExist: true });
  connection.pragma('synchronous = NORMAL');
  connection.pragma('busy_timeout = 30000');
  connection.pragma('wal_autocheckpoint = 0');
  // What is removed is overwritten: erased records must not be readable in the file any more.
  connection.pragma('secure_delete = ON');
  return connection;
}

/** False when it was stopped before the end. */
function carryOut({ work, stop }: StorageTask, blocks: BlockTable): boolean {
  if (work.kind === 'clear') blocks.clear(work.revisionId);
  if (work.kind === 'sweep') blocks.sweep(work.silentBefore);
  if (work.kind !== 'store') return true;
  const flag = new Int32Array(stop);
  const spill = new SpillFile(work.spillPath, 'r');
  try {
    return blocks.store(work.revisionId, work.table, spill, {
      stopped: () => Atomics.load(flag, 0) !== 0,
      stored: (done, total) => say({ kind: 'progress', done, total }),
    });
  } finally {
    spill.close();
  }
}

/** Stores what it is told of until it is told the end. */
function follow(revisionId: string, spillPath: string, connection: BetterSqlite3.Database): void {
  const blocks = new BlockTable(connection);
  const spill = new SpillFile(spillPath, 'r');
  parentPort?.on('message', (message: FollowMessage) => {
    if (message.kind === 'blocks') {
      blocks.put(revisionId, message.blocks, spill);
      return;
    }
    spill.close();
    connection.close();
    say({ kind: 'done' });
    parentPort?.close();
  });
}

/** Runs in a worker thread: one piece of work, then it ends. */
function run(task: StorageTask): void {
  const connection = openConnection(task.databasePath);
  if (task.work.kind === 'follow') {
    follow(task.work.revisionId, task.work.spillPath, connection);
    return;
  }
  try {
    say({ kind: carryOut(task, new BlockTable(connection)) ? 'done' : 'stopped' });
  } finally {
    connection.close();
  }
}

run(workerData as StorageTask);
