import { parentPort, workerData } from 'node:worker_threads';
import type { Database } from 'better-sqlite3';
import type { DateRecordColumn, NumericRecordColumn } from '../../regression/records';
import { withReadingConnection } from '../reading-connection';
import { readRecordTableWith, RecordsMissingError } from '../record-table-reader';
import { clusteredOrder } from './clustered-order';
import { compareTables } from './comparison/compare-tables';
import { renamedTable } from './comparison/renamed-table';
import { storedTable } from './comparison/stored-table';
import { correlationMap } from './correlation-map';
import type { LookTask, LookTasks } from './look-task';
import { matchingRows } from './matching-rows';
import { RevisionCells } from './revision-cells';
import { scatterSample, type ScatterPoints } from './scatter-sample';

function measure(connection: Database, revisionId: string, name: string): NumericRecordColumn | DateRecordColumn {
  const [column] = readRecordTableWith(connection, revisionId, [name]).columns;
  if (column.kind !== 'numeric' && column.kind !== 'date') throw new RecordsMissingError(`A measure ${name}`);
  return column;
}

function scatter(connection: Database, { revisionId, x, y }: LookTasks['scatter']['asked']): ScatterPoints {
  return scatterSample(measure(connection, revisionId, x).values, measure(connection, revisionId, y).values);
}

async function answer(task: LookTask): Promise<unknown> {
  const ordering = task.kind === 'correlations' ? await clusteredOrder() : null;
  return withReadingConnection(task.databasePath, (connection) => {
    const cells = (revisionId: string): RevisionCells => new RevisionCells(connection, revisionId);
    switch (task.kind) {
      case 'matching-rows': {
        const { revisionId, where } = task.asked;
        return matchingRows(connection, revisionId, cells(revisionId), where);
      }
      case 'rows-at':
        return cells(task.asked.revisionId).rowsAt(task.asked.positions);
      case 'correlations':
        return ordering && correlationMap(cells(task.asked.revisionId), task.asked.columns, ordering);
      case 'scatter':
        return scatter(connection, task.asked);
      case 'comparison': {
        const { fromId, toId, key, renames } = task.asked;
        const from = renamedTable(storedTable(connection, fromId), renames);
        return compareTables(from, storedTable(connection, toId), key);
      }
    }
  });
}

/** Runs in a worker thread: one question, then it ends. */
void answer(workerData as LookTask).then((found) => parentPort?.postMessage(found));
