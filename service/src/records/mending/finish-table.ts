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

/** Finishes the columns of one table, one after another, so that no more than one need be in memory. */
export class TableFinisher {
  readonly blockRowCounts: readonly number[];
  private readonly starts: readonly number[];
  private readonly blockRows: number;
  private readonly sorter: ReadingSorter;

  constructor(
    { rowCount, columnCount }: { readonly rowCount: number; readonly columnCount: number },
    private readonly spill: SpillFile,
  ) {
    const blockRows = blockRowsFor(columnCount);
    this.blockRows = blockRows;
    this.starts = Array.from({ length: Math.ceil(rowCount / blockRows) }, (_, block) => block * blockRows);
    this.blockRowCounts = this.starts.map((start) => Math.min(blockRows, rowCount - start));
    this.sorter = new ReadingSorter(rowCount);
  }

  /** Writes the cells to the spill file in the form in which they are stored, and takes the column's figures. */
  finish(column: RecordColumn, position: number): FinishedColumn {
    return {
      name: column.name,
      position,
      kind: column.kind,
      unit: column.kind === 'numeric' ? (column.unit ?? null) : null,
      blocks: this.starts.map((start) => this.spill.append(cellsOf(column, start, start + this.blockRows))),
      ...figuresOf(column, this.sorter),
    };
  }
}

export function finishTable({ rowCount, columns }: RecordTable, spill: SpillFile): FinishedTable {
  const finisher = new TableFinisher({ rowCount, columnCount: columns.length }, spill);
  const finished = columns.map((column, position) => finisher.finish(column, position));
  return { rowCount, blockRowCounts: finisher.blockRowCounts, columns: finished };
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
