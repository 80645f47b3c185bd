import type { Database } from 'better-sqlite3';
import type { RecordColumn, RecordTable } from '../regression/records';
import { cellsToTexts, type ColumnKind } from './cell-blocks';
import { withReadingConnection } from './reading-connection';

interface ColumnRow {
  readonly position: number;
  readonly name: string;
  readonly kind: ColumnKind;
  readonly unit: string | null;
  readonly levels: string;
}

/** The revision's rows, or a column of it, are not in the database. */
export class RecordsMissingError extends Error {
  constructor(what: string) {
    super(`${what} is not in the database.`);
    this.name = 'RecordsMissingError';
  }
}

/**
 * How many rows the revision has. Throws when it was deleted or its rows were erased. Both are said in its row before
 * cells and levels go, so whoever asks once more after reading knows that what was read was whole.
 */
export function rowCountOf(connection: Database, revisionId: string): number {
  const found = connection
    .prepare('SELECT row_count FROM record_revisions WHERE id = ? AND erased_at IS NULL')
    .pluck()
    .get(revisionId) as number | undefined;
  if (found === undefined) throw new RecordsMissingError(`Revision ${revisionId}`);
  return found;
}

/**
 * Reads a revision's columns (all, or those named, in the order named) over a read-only connection of its own.
 * Synchronous: for worker threads. Cost: one copy of the cells asked for.
 */
export const readRecordTable = (
  databasePath: string,
  revisionId: string,
  columnNames?: readonly string[],
): RecordTable =>
  withReadingConnection(databasePath, (connection) => readRecordTableWith(connection, revisionId, columnNames));

/** As `readRecordTable`, over a connection that is open already. */
export function readRecordTableWith(
  connection: Database,
  revisionId: string,
  columnNames?: readonly string[],
): RecordTable {
  const rowCount = rowCountOf(connection, revisionId);
  const rows = connection
    .prepare('SELECT position, name, kind, unit, levels FROM record_columns WHERE revision_id = ? ORDER BY position')
    .all(revisionId) as ColumnRow[];
  const wanted = columnNames === undefined ? rows : columnNames.map((name) => requireColumn(rows, name));
  const blocks = connection
    .prepare('SELECT cells FROM record_blocks WHERE revision_id = ? AND position = ? ORDER BY block')
    .pluck();
  const read = (row: ColumnRow): RecordColumn =>
    toRecordColumn(row, blocks.iterate(revisionId, row.position) as IterableIterator<Buffer>, rowCount);
  const columns = wanted.map(read);
  rowCountOf(connection, revisionId);
  return { rowCount, columns };
}

function requireColumn(rows: readonly ColumnRow[], name: string): ColumnRow {
  const found = rows.find((row) => row.name === name);
  if (!found) throw new RecordsMissingError(`The column ${name}`);
  return found;
}

function toRecordColumn(row: ColumnRow, blocks: Iterable<Buffer>, rowCount: number): RecordColumn {
  const { name, kind } = row;
  if (kind === 'text') return { name, kind, values: textsOf(blocks, rowCount) };
  if (kind === 'category') {
    const codes = new Int32Array(rowCount);
    copyCells(codes, blocks);
    return { name, kind, codes, levels: (JSON.parse(row.levels) as { value: string }[]).map((level) => level.value) };
  }
  const values = new Float64Array(rowCount);
  copyCells(values, blocks);
  return kind === 'date'
    ? { name, kind, values }
    : { name, kind, values, ...(row.unit !== null && { unit: row.unit }) };
}

function textsOf(blocks: Iterable<Buffer>, rowCount: number): readonly (string | null)[] {
  const values: (string | null)[] = [];
  for (const cells of blocks) for (const text of cellsToTexts(cells)) values.push(text);
  if (values.length !== rowCount) throw new RecordsMissingError('A block of cells');
  return values;
}

function copyCells(target: Float64Array | Int32Array, blocks: Iterable<Buffer>): void {
  const bytes = new Uint8Array(target.buffer);
  let at = 0;
  for (const cells of blocks) {
    bytes.set(cells, at);
    at += cells.byteLength;
  }
  if (at !== bytes.byteLength) throw new RecordsMissingError('A block of cells');
}
