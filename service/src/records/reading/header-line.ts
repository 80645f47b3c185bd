import { usualWidth, type SampleRecord } from './delimiter';
import { NumberClass, NumberReader } from './number-cell';

/** Titles, a date of export, a blank line: no more than a few stand above a table. */
const furthestHeader = 50;

const filledCells = (cells: readonly string[]): number => cells.filter((cell) => cell.trim() !== '').length;

function areNumbers(cells: readonly string[]): boolean {
  const reader = new NumberReader();
  return cells.every((cell) => cell.trim() === '' || reader.read(cell) !== NumberClass.none);
}

/**
 * The line that names the columns. Lines above it are titles: no more than half as many cells are filled as the table
 * has columns, or one cell only. The first record when nothing further down reads like names.
 */
export function findHeaderLine(records: readonly SampleRecord[]): number {
  const first = records[0]?.line ?? 1;
  const width = usualWidth(records);
  if (width < 2) return first;
  const most = Math.max(1, Math.floor(width / 2));
  const header = records.slice(0, furthestHeader).find(({ cells }) => filledCells(cells) > most);
  if (!header || areNumbers(header.cells)) return first;
  return header.line;
}
