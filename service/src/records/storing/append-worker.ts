import { parentPort, workerData } from 'node:worker_threads';
import type { Database } from 'better-sqlite3';
import type { FinishedTable } from '../mending/finish-table';
import { SpillFile } from '../reading/spill-file';
import { withReadingConnection } from '../reading-connection';
import { readRecordTableWith, rowCountOf } from '../record-table-reader';
import type { TaskProgress } from '../tasks/record-tasks-store';
import type { ProgressMessage } from '../worker-answer';
import { appendTable, type BaseTable } from './append-table';
import type { AppendTask } from './append-task';

const tell = (done: number, total: number): void => {
  const message: ProgressMessage<TaskProgress> = { progress: { stage: 'measuring', done, total } };
  parentPort?.postMessage(message);
};

function baseTable(connection: Database, revisionId: string): BaseTable {
  const names = connection
    .prepare('SELECT name FROM record_columns WHERE revision_id = ? ORDER BY position')
    .pluck()
    .all(revisionId);
  return {
    rowCount: rowCountOf(connection, revisionId),
    columnNames: names as string[],
    readColumn: (name) => readRecordTableWith(connection, revisionId, [name]).columns[0],
  };
}

function append({ databasePath, baseRevisionId, added, addedSpillPath, spillPath }: AppendTask): FinishedTable {
  const spills = { added: new SpillFile(addedSpillPath, 'r'), all: new SpillFile(spillPath, 'wx+') };
  try {
    return withReadingConnection(databasePath, (connection) =>
      appendTable(baseTable(connection, baseRevisionId), added, spills, tell),
    );
  } finally {
    spills.added.close();
    spills.all.close();
  }
}

/** Runs in a worker thread: one table, then it ends. */
parentPort?.postMessage(append(workerData as AppendTask));
