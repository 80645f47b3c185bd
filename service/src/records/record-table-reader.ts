import BetterSqlite3 from 'better-sqlite3';
import type { RecordColumn, RecordTable } from '../regression/records';
import { cellsToTexts, type ColumnKind } from './cell-blocks';

interface ColumnRow {
  readonly position: number;
  readonly name: string;
  readonly kind: ColumnKind;
  readonly unit: string | null;
  readonly levels: string;
}

/** The revision, or a column of it, is not in the database. */
export class RecordsMissingError extends Error {
  constructor(what: string) {
    super(`${what} is not in the database.`);
    this.name = 'RecordsMissingError';
  }
}

/**
 * Reads a revision's columns (all, or those named, in the order named) over a read-only connection of its own.
 * Synchronous: for worker threads. Cost: one copy of the cells asked for.
 */
export function readRecordTable(
  databasePath: string,
  revisionId: string,
  columnNames?: readonly string[],
): RecordTable {
  const connection = new BetterSqlite3(databasePath, { readonly: true, fileMustExist: true });
  try {
    connection.pragma('busy_timeout = 10000');
    return readRecordTableWith(connection, revisionId, columnNames);
  } finally {
    connection.close();
  }
}

/** As `readRecordTable`, over a connection that is open already. */
export function readRecordTableWith(
  connection: BetterSqlite3.Database,
  revisionId: string,
  columnNames?: readonly string[],
): RecordTable {
  const revision = connection
    .prepare('SELECT row_count AS rowCount FROM record_revisions WHERE id = ?')
    .get(revisionId) as { readonly rowCount: number } | undefined;
  if (!revision) throw new RecordsMissingError(`Revision ${revisionId}`);
  const rows = connection
    .prepare('SELECT position, name, kind, unit, levels FROM record_columns WHERE revision_id = ? ORDER BY position')
    .all(revisionId) as ColumnRow[];
  const wanted = columnNames === undefined ? rows : columnNames.map((name) => requireColumn(rows, name));
  const blocks = connection
    .prepare('SELECT cells FROM record_blocks WHERE revision_id = ? AND position = ? ORDER BY block')
    .pluck();
  const read = (row: ColumnRow): RecordColumn =>
    toRecordColumn(row, blocks.iterate(revisionId, row.position) as IterableIterator<Buffer>, revision.rowCount);
  return { rowCount: revision.rowCount, columns: wanted.map(read) };
}

function requireColumn(rows: readonly ColumnRow[], name: string): ColumnRow {
  const found = rows.find((row) => row.name === name);
  if (!found) throw new RecordsMissingError(`The column ${name}`);
  return found;
}

function toRecordColumn(row: ColumnRow, blocks: Iterable<Buffer>, rowCount: number): RecordColumn {
  const { name, kind } = row;
  if (kind === 'text') return { name, kind, values: [...blocks].flatMap(cellsToTexts) };
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

function copyCells(target: Float64Array | Int32Array, blocks: Iterable<Buffer>): void {
  const bytes = new Uint8Array(target.buffer);
  let at = 0;
  for (const cells of blocks) {
    bytes.set(cells, at);
    at += cells.byteLength;
  }
  if (at !== bytes.byteLength) throw new RecordsMissingError('A block of cells');
}
