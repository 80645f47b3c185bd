import type { ColumnKind } from '../../cell-blocks';
import type { RecordColumn } from '../../../regression/records';
import { dateText } from '../../reading/date-cell';
import type { CellValue } from '../../revision-rows';

export interface ComparedColumn {
  readonly name: string;
  readonly kind: ColumnKind;
  readonly unit: string | null;
  readonly missingCount: number;
  /** Null when it is not known. */
  readonly distinctCount: number | null;
}

/** One side of a comparison: its columns' facts, and their cells a column at a time. */
export interface ComparedTable {
  readonly rowCount: number;
  readonly columns: readonly ComparedColumn[];
  read(name: string): RecordColumn;
}

/** A column's cells in a form in which those of both sides can be compared; null is missing. */
export type Cells = (row: number) => number | string | null;

const classOf = ({ kind }: Pick<RecordColumn, 'kind'>): 'numeric' | 'date' | 'words' =>
  kind === 'numeric' || kind === 'date' ? kind : 'words';

/** As the cell is shown to people: numbers as they are, dates as year-month-day. */
export function shownCells(column: RecordColumn): (row: number) => CellValue {
  if (column.kind === 'category') return (row) => column.levels[column.codes[row]] ?? null;
  if (column.kind === 'text') return (row) => column.values[row];
  const { values } = column;
  if (column.kind === 'date') return (row) => (Number.isNaN(values[row]) ? null : dateText(values[row]));
  return (row) => (Number.isNaN(values[row]) ? null : values[row]);
}

/** Days of a date without writing them out; all else as shown. */
function plainCells(column: RecordColumn): Cells {
  if (column.kind !== 'date') return shownCells(column);
  const { values } = column;
  return (row) => (Number.isNaN(values[row]) ? null : values[row]);
}

function writtenCells(column: RecordColumn): Cells {
  const shown = shownCells(column);
  return (row) => {
    const value = shown(row);
    return value === null ? null : String(value);
  };
}

/** Both sides' cells, as they are when the kinds allow it; as written when, say, numbers have become words. */
export const comparableCells = (from: RecordColumn, to: RecordColumn): readonly [Cells, Cells] =>
  classOf(from) === classOf(to) ? [plainCells(from), plainCells(to)] : [writtenCells(from), writtenCells(to)];

/** Names that both sides have, in the order of `to`. */
export function sharedNames(from: ComparedTable, to: ComparedTable): string[] {
  const names = new Set(from.columns.map(({ name }) => name));
  return to.columns.map(({ name }) => name).filter((name) => names.has(name));
}
