import { stat } from 'node:fs/promises';
import type { SampleRecord } from '../delimiter';
import type { FileFormat } from '../file-format';
import { findHeaderLine } from '../header-line';
import type { ReadingChoices } from '../reading-choices';
import type { OnRow, RowSource } from '../row-source';
import { TableProblem } from '../table-problem';
import { cellText, hasCommas, readSheetRows, type SheetRow } from './workbook-cells';
import { WorkbookParts, type Sheet } from './workbook-parts';

/** Rows of a sheet from which the header is found, as many as of a text. */
const headerRows = 200;
/** Progress is told every so many rows. */
const progressRows = 1000;

const isFilled = (cell: SheetRow[number]): boolean => cell !== null && cell !== '';

interface SheetTable {
  readonly sheet: string;
  readonly rows: readonly SheetRow[];
  /** Positions of the columns that hold anything, for a table need not begin in the sheet's first column. */
  readonly positions: readonly number[];
}

/** From `first` on: what stands above the header makes no column. */
function filledPositions(rows: readonly SheetRow[], first = 0): number[] {
  const filled = new Set<number>();
  for (let row = first; row < rows.length; row++)
    rows[row].forEach((cell, position) => void (isFilled(cell) && filled.add(position)));
  return [...filled].sort((a, b) => a - b);
}

async function readSheetTable(parts: WorkbookParts, sheet: Sheet): Promise<SheetTable> {
  const rows = await readSheetRows(await parts.partsOf(sheet), sheet.name);
  return { sheet: sheet.name, rows, positions: filledPositions(rows) };
}

const isTable = ({ rows }: SheetTable): boolean => rows.filter((row) => row.some(isFilled)).length > 1;

const sheetNames = (sheets: readonly Sheet[]): string =>
  sheets
    .slice(0, 20)
    .map(({ name }) => `“${name.slice(0, 60)}”`)
    .join(', ');

async function readChosen(parts: WorkbookParts, name: string): Promise<SheetTable> {
  const sheet = parts.sheets.find((one) => one.name === name);
  if (sheet) return readSheetTable(parts, sheet);
  throw new TableProblem(
    'file-sheet',
    `The workbook has no sheet “${name.slice(0, 60)}”. Its sheets are ${sheetNames(parts.sheets)}.`,
  );
}

/** The first sheet with a table; those that can be seen go before the hidden ones. */
async function readFirstTable(parts: WorkbookParts): Promise<SheetTable> {
  const inOrder = [...parts.sheets.filter(({ hidden }) => !hidden), ...parts.sheets.filter(({ hidden }) => hidden)];
  for (const sheet of inOrder) {
    const table = await readSheetTable(parts, sheet);
    if (isTable(table)) return table;
  }
  throw new TableProblem(
    'file-empty',
    'No sheet of the workbook has a table. Send one with names and at least one row.',
  );
}

function sampleOf({ rows, positions }: SheetTable): SampleRecord[] {
  const sample = rows.slice(0, headerRows).map((row, at) => ({
    cells: positions.map((position) => cellText(row[position], false)),
    line: at + 1,
  }));
  return sample.filter(({ cells }) => cells.some((cell) => cell !== ''));
}

/** Hands over the rows from the header on as text; wholly blank ones are passed over. */
function readRows(
  { rows, positions }: SheetTable,
  headerLine: number,
  onRow: OnRow,
  told: (share: number) => void,
): void {
  const total = rows.length;
  const columns = positions.map((position) => ({ position, withComma: hasCommas(rows, position) }));
  for (let at = headerLine - 1; at < total; at++) {
    const row = rows[at];
    if (row.some(isFilled)) onRow(columns.map(({ position, withComma }) => cellText(row[position], withComma)));
    if ((at + 1) % progressRows === 0 || at + 1 === total) told((at + 1) / total);
  }
}

/** Opens one sheet of a workbook: the one chosen, or the first that has a table. Its cells are held in memory. */
export async function openWorkbook(path: string, choices: ReadingChoices): Promise<RowSource> {
  const parts = await WorkbookParts.open(path);
  // A workbook's bytes are not read in order: its share of rows stands for the share of its bytes.
  const { size: bytes } = await stat(path);
  const whole = choices.sheet === undefined ? await readFirstTable(parts) : await readChosen(parts, choices.sheet);
  const headerLine = choices.headerLine ?? findHeaderLine(sampleOf(whole));
  const table = { ...whole, positions: filledPositions(whole.rows, headerLine - 1) };
  const format: FileFormat = { encoding: '', delimiter: '', headerLine };
  return {
    format,
    sheets: parts.sheets.map(({ name }) => name),
    sheet: table.sheet,
    read: async (onRow, onProgress) =>
      readRows(table, headerLine, onRow, (share) =>
        onProgress?.({ stage: 'reading', done: share * bytes, total: bytes }),
      ),
  };
}
