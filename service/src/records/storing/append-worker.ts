import { parentPort, workerData } from 'node:worker_threads';
import BetterSqlite3 from 'better-sqlite3';
import type { FinishedTable } from '../mending/finish-table';
import { SpillFile } from '../reading/spill-file';
import { readRecordTableWith } from '../record-table-reader';
import type { TaskProgress } from '../tasks/record-tasks-store';
import type { ProgressMessage } from '../worker-answer';
import { appendTable, type BaseTable } from './append-table';
import type { AppendTask } from './append-task';

const tell = (done: number, total: number): void => {
  const message: ProgressMessage<TaskProgress> = { progress: { stage: 'measuring', done, total } };
  parentPort?.postMessage(message);
};

function baseTable(connection: BetterSqlite3.Database, revisionId: string): BaseTable {
  const rowCount = connection.prepare('SELECT row_count FROM record_revisions WHERE id = ?').pluck().get(revisionId);
  const names = connection
    .prepare('SELECT name FROM record_columns WHERE revision_id = ? ORDER BY position')
    .pluck()
    .all(revisionId);
  return {
    rowCount: Number(rowCount),
    columnNames: names as string[],
    readColumn: (name) => readRecordTableWith(connection, revisionId, [name]).columns[0],
  };
}

function append({ databasePath, baseRevisionId, added, addedSpillPath, spillPath }: AppendTask): FinishedTable {
  const connection = new BetterSqlite3(databasePath, { readonly: true, fileMustExist: true });
  const spills = { added: new SpillFile(addedSpillPath, 'r'), all: new SpillFile(spillPath, 'wx+') };
  try {
    connection.pragma('busy_timeout = 10000');
    return appendTable(baseTable(connection, baseRevisionId), added, spills, tell);
  } finally {
    spills.added.close();
    spills.all.close();
    connection.close();
  }
}

/** Runs in a worker thread: one table, then it ends. */
parentPort?.postMessage(append(workerData as AppendTask));
