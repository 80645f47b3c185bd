import type { RecordColumn } from '../../regression/records';
import { cellsToCodes, cellsToTexts } from '../cell-blocks';
import { TableFinisher, type FinishedTable } from '../mending/finish-table';
import type { FinishedColumn } from '../reading/finished-column';
import type { SpillFile } from '../reading/spill-file';
import type { SpilledTable } from '../store-columns';
import { appendColumn } from './append-column';

/** The rows that come first. */
export interface BaseTable {
  readonly rowCount: number;
  readonly columnNames: readonly string[];
  readColumn(name: string): RecordColumn;
}

/** The rows that are added; its columns need not stand in the base's order. */
export interface AddedTable extends SpilledTable {
  readonly rowCount: number;
}

export interface AppendSpills {
  readonly added: SpillFile;
  /** Where the cells of all rows go. */
  readonly all: SpillFile;
}

/** The base's rows followed by the added ones, with figures over all of them. In memory is one column at a time. */
export function appendTable(
  base: BaseTable,
  added: AddedTable,
  spills: AppendSpills,
  onColumn: (done: number, total: number) => void = () => undefined,
): FinishedTable {
  const rowCount = base.rowCount + added.rowCount;
  const { columnNames } = base;
  const finisher = new TableFinisher({ rowCount, columnCount: columnNames.length }, spills.all);
  const byName = new Map(added.columns.map((column) => [column.name, column]));
  const columns = columnNames.map((name, position) => {
    const found = byName.get(name);
    if (!found) throw new Error('The rows that are appended lack a column of the revision.');
    const whole = appendColumn(base.readColumn(name), readSpilledColumn(found, added.rowCount, spills.added));
    const finished = finisher.finish(whole, position);
    onColumn(position + 1, columnNames.length);
    return finished;
  });
  return { rowCount, blockRowCounts: finisher.blockRowCounts, columns };
}

/** A finished column as it lies in a spill file. */
export function readSpilledColumn(column: FinishedColumn, rowCount: number, spill: SpillFile): RecordColumn {
  const { name, kind, blocks } = column;
  if (kind === 'text') return { name, kind, values: blocks.flatMap((place) => cellsToTexts(spill.read(place))) };
  const bytes = new Uint8Array(rowCount * (kind === 'category' ? 4 : 8));
  let at = 0;
  for (const place of blocks) {
    spill.readInto(bytes.subarray(at), place);
    at += place.length;
  }
  if (kind === 'category')
    return { name, kind, codes: cellsToCodes(bytes), levels: column.levels.map((level) => level.value) };
  const values = new Float64Array(bytes.buffer);
  return kind === 'numeric' && column.unit !== null
    ? { name, kind, values, unit: column.unit }
    : { name, kind, values };
}
