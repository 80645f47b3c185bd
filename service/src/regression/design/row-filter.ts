import { RegressionError } from '../errors';
import type { RecordColumn, RecordTable } from '../records';
import type { RowFilter } from '../specification';

/** Rows that pass the filter, in order; all rows without one. A missing reading never passes. */
export function keptRows(records: RecordTable, filter: RowFilter | null): Int32Array {
  const rows = Int32Array.from({ length: records.rowCount }, (_, row) => row);
  if (filter === null) return rows;
  const column = records.columns.find((candidate) => candidate.name === filter.column);
  if (column === undefined)
    throw new RegressionError('column-not-found', `The records have no column ${filter.column}.`, filter.column);
  const passes = rowTest(column, filter);
  return rows.filter(passes);
}

function rowTest(column: RecordColumn, filter: RowFilter): (row: number) => boolean {
  const allowed = filter.equals === undefined ? null : new Set(filter.equals);
  const from = filter.from ?? -Infinity;
  const to = filter.to ?? Infinity;
  if (column.kind === 'numeric' || column.kind === 'date') {
    const { values } = column;
    return (row) => values[row] >= from && values[row] <= to && (allowed === null || allowed.has(values[row]));
  }
  if (filter.from !== undefined || filter.to !== undefined) {
    throw new RegressionError(
      'bad-specification',
      `${column.name} holds words: filter it by values, not by a range.`,
      column.name,
    );
  }
  const wordAt =
    column.kind === 'category'
      ? (row: number) => column.levels[column.codes[row]] ?? null
      : (row: number) => column.values[row];
  return (row) => {
    const word = wordAt(row);
    return word !== null && (allowed === null || allowed.has(word));
  };
}
