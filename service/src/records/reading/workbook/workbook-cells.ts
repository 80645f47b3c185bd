import { NumberClass, NumberReader } from '../number-cell';
import { TableProblem } from '../table-problem';
import { damagedWorkbook } from './workbook-file';
import { zipExcerpt, type PackedPart } from './zip-excerpt';

/** A cell as the reader of workbooks gives it: formulas as their values, dates by their cell's format. */
export type SheetCell = string | number | boolean | Date | null;
export type SheetRow = readonly SheetCell[];

const millisecondsPerSecond = 1000;

/**
 * Year-month-day, with the time of day when there is one. A workbook counts days in binary fractions, so times are
 * taken to the nearest second. A time without a day lies before 1900 there.
 */
function dateCellText(date: Date): string {
  const time = Math.round(date.getTime() / millisecondsPerSecond) * millisecondsPerSecond;
  if (Number.isNaN(time)) return '';
  const text = new Date(time).toISOString();
  if (text.startsWith('1899-')) return text.slice(11, 19);
  return text.endsWith('T00:00:00.000Z') ? text.slice(0, 10) : `${text.slice(0, 10)} ${text.slice(11, 19)}`;
}

/**
 * A number as text that reads as this number only: `1.234` could be grouped thousands, `1.2340` cannot. In a column
 * whose words have decimal commas it gets one too.
 */
function numberCellText(value: number, withComma: boolean): string {
  const text = String(value);
  const plain = /^-?\d{1,3}\.\d{3}$/.test(text) ? `${text}0` : text;
  return withComma ? plain.replace('.', ',') : plain;
}

export function cellText(cell: SheetCell, withComma: boolean): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return numberCellText(cell, withComma);
  return cell instanceof Date ? dateCellText(cell) : String(cell);
}

/** Whether the text cells of a column have decimal commas and no decimal points. */
export function hasCommas(rows: readonly SheetRow[], position: number): boolean {
  const reader = new NumberReader();
  let commas = false;
  for (const row of rows) {
    const cell = row[position];
    if (typeof cell !== 'string') continue;
    const numberClass = reader.read(cell);
    if (numberClass === NumberClass.point) return false;
    if (numberClass === NumberClass.comma) commas = true;
  }
  return commas;
}

/** The rows of a sheet from its first row on, all equally wide. Loaded when needed: the reader serves workbooks only. */
export async function readSheetRows(parts: readonly PackedPart[], sheet: string): Promise<readonly SheetRow[]> {
  const { readSheet } = await import('read-excel-file/node');
  try {
    const rows: unknown = await readSheet(zipExcerpt(parts), sheet, { trim: false });
    return rows as readonly SheetRow[];
  } catch (error) {
    if (error instanceof TableProblem) throw error;
    throw damagedWorkbook(`cannot be read: its sheet “${sheet.slice(0, 60)}” is damaged or of another form`);
  }
}
