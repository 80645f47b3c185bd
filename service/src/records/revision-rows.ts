import type { Page } from '../http/page';
import { cellBytesOf, cellsToCodes, cellsToNumbers, cellsToTexts } from './cell-blocks';
import { dateText } from './reading/date-cell';
import type { ColumnRecord, RecordsStore } from './records-store';

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

const present = (value: number): number | null => (Number.isNaN(value) ? null : value);

async function readCells(
  store: RecordsStore,
  revisionId: string,
  column: ColumnRecord,
  part: BlockPart,
): Promise<CellValue[]> {
  const { kind, position, levels } = column;
  const width = cellBytesOf(kind);
  const bytes = width === 0 ? null : { start: part.start * width, length: part.rowCount * width };
  const cells = await store.cellsOf(revisionId, position, part.block, bytes);
  if (kind === 'text') return cellsToTexts(cells).slice(part.start, part.start + part.rowCount);
  if (kind === 'category') return Array.from(cellsToCodes(cells), (code) => (code < 0 ? null : levels[code].value));
  const values = Array.from(cellsToNumbers(cells), present);
  return kind === 'date' ? values.map((days) => (days === null ? null : dateText(days))) : values;
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
