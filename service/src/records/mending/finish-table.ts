import type { RecordColumn, RecordTable } from '../../regression/records';
import { blockRowsFor, codesToCells, numbersToCells, textsToCells } from '../cell-blocks';
import { statisticsOf, statisticsOfLevels } from '../reading/column-statistics';
import type { FinishedColumn } from '../reading/finished-column';
import { maximumDistinct } from '../reading/limits';
import { ReadingSorter } from '../reading/reading-sorter';
import type { SpillFile } from '../reading/spill-file';

export interface FinishedTable {
  readonly rowCount: number;
  readonly blockRowCounts: readonly number[];
  readonly columns: readonly FinishedColumn[];
}

/** Writes a table's cells to the spill file in the form in which they are stored, and takes its figures. */
export function finishTable(table: RecordTable, spill: SpillFile): FinishedTable {
  const blockRows = blockRowsFor(table.columns.length);
  const starts = Array.from({ length: Math.ceil(table.rowCount / blockRows) }, (_, block) => block * blockRows);
  const sorter = new ReadingSorter(table.rowCount);
  const finish = (column: RecordColumn, position: number): FinishedColumn => ({
    name: column.name,
    position,
    kind: column.kind,
    unit: column.kind === 'numeric' ? (column.unit ?? null) : null,
    blocks: starts.map((start) => spill.append(cellsOf(column, start, start + blockRows))),
    ...figuresOf(column, sorter),
  });
  return {
    rowCount: table.rowCount,
    blockRowCounts: starts.map((start) => Math.min(blockRows, table.rowCount - start)),
    columns: table.columns.map(finish),
  };
}

function cellsOf(column: RecordColumn, start: number, end: number): Uint8Array {
  if (column.kind === 'text') return textsToCells(column.values.slice(start, end));
  return column.kind === 'category'
    ? codesToCells(column.codes.subarray(start, end))
    : numbersToCells(column.values.subarray(start, end));
}

function figuresOf(column: RecordColumn, sorter: ReadingSorter): Pick<FinishedColumn, 'statistics' | 'levels'> {
  if (column.kind === 'text') {
    const present = column.values.filter((text) => text !== null);
    const different = new Set(present).size;
    const missing = column.values.length - present.length;
    return { statistics: statisticsOfLevels(missing, different > maximumDistinct ? null : different), levels: [] };
  }
  if (column.kind !== 'category') return { statistics: statisticsOf(column.kind, column.values, sorter), levels: [] };
  const levels = column.levels.map((value) => ({ value, count: 0 }));
  let missing = 0;
  for (const code of column.codes) {
    if (code < 0) missing++;
    else levels[code].count++;
  }
  return { statistics: statisticsOfLevels(missing, levels.length), levels };
}
