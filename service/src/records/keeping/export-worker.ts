import { parentPort, workerData } from 'node:worker_threads';
import { RevisionCells } from '../looking/revision-cells';
import { openForReading } from '../reading-connection';
import { byteOrderMark, csvText } from './csv-text';
import type { ExportedPart, ExportTask } from './export-task';

/** Rows of a part: some hundreds of kilobytes of an ordinary table. */
const partRows = 4000;

/** The header, then the rows; of the cells, one block of every column is in memory at a time. */
function* partsOf({ databasePath, revisionId }: ExportTask): Generator<string> {
  const connection = openForReading(databasePath);
  try {
    const cells = new RevisionCells(connection, revisionId);
    yield byteOrderMark + csvText([cells.columns.map((column) => column.name)]);
    let begin = 0;
    for (const rowCount of cells.blockRowCounts) {
      const first = begin;
      const rows = cells.rowsAt(Uint32Array.from({ length: rowCount }, (_, at) => first + at));
      for (let at = 0; at < rowCount; at += partRows) yield csvText(rows.slice(at, at + partRows));
      begin += rowCount;
    }
  } finally {
    connection.close();
  }
}

/**
 * Runs in a worker thread: gives a part each time that it is asked for one, so that it never runs further ahead of
 * whoever reads the file; null is the end. It is ended from outside.
 */
function givePartsWhenAsked(task: ExportTask): void {
  const encoder = new TextEncoder();
  const parts = partsOf(task);
  parentPort?.on('message', () => {
    const next = parts.next();
    const part: ExportedPart = next.done ? null : encoder.encode(next.value);
    parentPort?.postMessage(part);
  });
}

givePartsWhenAsked(workerData as ExportTask);
