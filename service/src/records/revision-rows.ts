import type { Page } from '../http/page';
import { cellBytesOf, cellsToCodes, cellsToNumbers, type ColumnKind } from './cell-blocks';
import { dateText } from './reading/date-cell';
import type { ColumnRecord, RecordsStore } from './records-store';
import { TextBlock } from './text-block';

export type CellValue = number | string | null;

interface BlockPart {
  readonly block: number;
  readonly start: number;
  readonly rowCount: number;
}

/** The parts of blocks that a page of rows takes. */
export function partsOf(blockRowCounts: readonly number[], { limit, offset }: Page): BlockPart[] {
  const parts: BlockPart[] = [];
  let begin = 0;
  blockRowCounts.forEach((rows, block) => {
    const start = Math.max(0, offset - begin);
    const end = Math.min(rows, offset + limit - begin);
    if (end > start) parts.push({ block, start, rowCount: end - start });
    begin += rows;
  });
  return parts;
}

/** Stored cells as people read them, each when it is asked for; dates as year-month-day, null for a missing one. */
export function cellsAsShown(
  kind: ColumnKind,
  levels: readonly { readonly value: string }[],
  cells: Uint8Array,
): (at: number) => CellValue {
  if (kind === 'text') {
    const texts = new TextBlock(cells);
    return (at) => texts.at(at);
  }
  if (kind === 'category') {
    const codes = cellsToCodes(cells);
    return (at) => (codes[at] < 0 ? null : levels[codes[at]].value);
  }
  const values = cellsToNumbers(cells);
  const shown = (value: number): CellValue => (kind === 'date' ? dateText(value) : value);
  return (at) => (Number.isNaN(values[at]) ? null : shown(values[at]));
}

async function readCells(
  store: RecordsStore,
  revisionId: string,
  { kind, position, levels }: ColumnRecord,
  part: BlockPart,
): Promise<CellValue[]> {
  const width = cellBytesOf(kind);
  const bytes = width === 0 ? null : { start: part.start * width, length: part.rowCount * width };
  const shown = cellsAsShown(kind, levels, await store.cellsOf(revisionId, position, part.block, bytes));
  const first = bytes ? 0 : part.start;
  return Array.from({ length: part.rowCount }, (_, at) => shown(first + at));
}

/** A page of a revision's rows, read from the bytes of just those rows (whole blocks for text). */
export async function readRows(
  store: RecordsStore,
  revisionId: string,
  columns: readonly ColumnRecord[],
  page: Page,
): Promise<CellValue[][]> {
  const parts = partsOf(await store.blockRowCounts(revisionId), page);
  const rows: CellValue[][] = [];
  for (const part of parts) {
    const cells: CellValue[][] = [];
    for (const column of columns) cells.push(await readCells(store, revisionId, column, part));
    for (let row = 0; row < part.rowCount; row++) rows.push(cells.map((column) => column[row]));
  }
  return rows;
}
