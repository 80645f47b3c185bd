import { fileMarkOf, formOf, sameForm, type CellForm } from './cell-form';
import type { ColumnBuilder } from './column-builder';
import type { FileFormat } from './file-format';
import { finishColumns, type FinishedColumn } from './finished-column';
import type { DecimalMark } from './number-cell';
import type { BaseColumn, ReadingChoices } from './reading-choices';
import { headerBeyondFile, openRowSource, type OnProgress, type RowSource } from './row-source';
import type { SpillFile } from './spill-file';
import { TablePass, type TablePassParts } from './table-pass';
import { TableProblem } from './table-problem';

export interface TableReading {
  readonly rowCount: number;
  /** Rows of each block, the same for every column. */
  readonly blockRowCounts: readonly number[];
  readonly columns: readonly FinishedColumn[];
  readonly format: FileFormat;
  readonly decimal: DecimalMark;
  /** Of a workbook. */
  readonly sheet: string | null;
  /** Marks taken as missing in every column beside the usual ones. */
  readonly missingMarks: readonly string[];
  /** Columns of the file that were never stored. */
  readonly setAside: readonly string[];
  /** Columns with cells that do not fit their kind, and how many; these cells are missing. */
  readonly unreadable: readonly { readonly column: string; readonly count: number }[];
}

export interface ReadOptions {
  readonly choices?: ReadingChoices;
  /** Columns of the revision that the file is appended to: their kinds and units hold, others are set aside. */
  readonly base?: readonly BaseColumn[];
  readonly onProgress?: OnProgress;
}

interface Reading {
  readonly source: RowSource;
  readonly parts: TablePassParts;
  readonly onProgress?: OnProgress;
}

async function runPass({ source, onProgress }: Reading, pass: TablePass): Promise<void> {
  await source.read(pass.addRow, onProgress);
  pass.end();
}

function requireRows(pass: TablePass, { format, choices }: TablePassParts): void {
  if (pass.rowCount > 0) return;
  if (!pass.hasHeader && choices.headerLine !== undefined) throw headerBeyondFile(choices.headerLine);
  throw new TableProblem(
    'file-empty',
    'The file has a header but no rows. Send a table with at least one row.',
    format.headerLine,
  );
}

/**
 * Reads a file into typed columns whose cells lie in the spill file. One pass; a second, for the columns concerned
 * only, when later rows show that a kind guessed from the first rows was wrong. Memory does not grow with the rows of
 * a text, but for one column at a time while its statistics are taken; a workbook's sheet is held as a whole.
 */
export async function readTable(path: string, spill: SpillFile, options: ReadOptions = {}): Promise<TableReading> {
  const { choices = {}, base, onProgress } = options;
  const source = await openRowSource(path, choices);
  const { format } = source;
  const reading: Reading = { source, parts: { format, spill, choices, base }, onProgress };
  const pass = new TablePass(reading.parts);
  await runPass(reading, pass);
  requireRows(pass, reading.parts);
  const evidence = pass.builders.map((builder) => builder.evidence);
  const decimal = choices.decimal ?? fileMarkOf(evidence, format.delimiter);
  const builders = await readAgainWhereWrong(reading, pass.builders, decimal);
  const measured = (done: number): void => onProgress?.({ stage: 'measuring', done, total: builders.length });
  return {
    rowCount: pass.rowCount,
    blockRowCounts: pass.blockRowCounts,
    // Numbered anew, since those that were set aside leave gaps.
    columns: finishColumns(builders, pass.rowCount, measured).map((column, position) => ({ ...column, position })),
    format,
    decimal,
    sheet: source.sheet,
    missingMarks: choices.missingMarks ?? [],
    setAside: pass.plans.filter((plan) => plan.setAside).map((plan) => plan.name),
    unreadable: builders
      .filter((builder) => builder.unreadableCount > 0)
      .map((builder) => ({ column: builder.options.name, count: builder.unreadableCount })),
  };
}

/** A second pass goes on from where the first one ended, so that progress never goes back. */
const secondHalf = (onProgress?: OnProgress): OnProgress | undefined =>
  onProgress && (({ stage, done, total }) => onProgress({ stage, done: total + done, total: 2 * total }));

async function readAgainWhereWrong(
  reading: Reading,
  builders: readonly ColumnBuilder[],
  decimal: DecimalMark,
): Promise<readonly ColumnBuilder[]> {
  const wrong = new Map<number, CellForm>();
  for (const { evidence, form, options } of builders) {
    const decided = formOf(evidence, decimal);
    if (form.kind !== 'words' && !sameForm(form, decided, evidence)) wrong.set(options.position, decided);
  }
  if (wrong.size === 0) return builders;
  const pass = new TablePass(reading.parts, wrong);
  await runPass({ ...reading, onProgress: secondHalf(reading.onProgress) }, pass);
  const mended = new Map(pass.builders.map((builder) => [builder.options.position, builder]));
  return builders.map((builder) => mended.get(builder.options.position) ?? builder);
}
