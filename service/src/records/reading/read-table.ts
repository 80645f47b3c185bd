import { blockRowsFor } from '../cell-blocks';
import { ColumnBuilder } from './column-builder';
import { fileMarkOf, formOf, likelyFormOf, sameForm, type CellForm } from './column-evidence';
import { readSample } from './file-bytes';
import { detectFormat, type FileFormat } from './file-format';
import { finishColumns, type FinishedColumn } from './finished-column';
import { readHeader } from './header';
import { guessRows, sampleBytes } from './limits';
import type { DecimalMark } from './number-cell';
import { parseRows } from './parse-rows';
import { SpillFile } from './spill-file';
import { TableProblem } from './table-problem';

export interface TableReading {
  readonly rowCount: number;
  /** Rows of each block, the same for every column. */
  readonly blockRowCounts: readonly number[];
  readonly columns: readonly FinishedColumn[];
  readonly format: FileFormat;
  readonly decimal: DecimalMark;
}

/** Cells of the rows that a first guess rests on, and of a batch: bounds on what is held as text. */
const guessCells = 150_000;
const batchCells = 8192;

/** One pass over the file into blocks of cells. */
class TablePass {
  builders: readonly ColumnBuilder[] = [];
  readonly blockRowCounts: number[] = [];
  rowCount = 0;
  private batch: (readonly string[])[] = [];
  private batchRows = 0;
  private guessing: boolean;
  private filled = 0;
  private fileMark: DecimalMark = '.';
  private names: readonly string[] | null = null;
  private blockRows = 0;

  /** `decided`: forms by position, for the columns to read; without it all are read and their forms guessed. */
  constructor(
    private readonly format: FileFormat,
    private readonly spill: SpillFile,
    private readonly decided?: ReadonlyMap<number, CellForm>,
  ) {
    this.guessing = decided === undefined;
  }

  readonly addRow = (cells: readonly string[]): void => {
    if (this.names === null) {
      this.begin(cells);
      return;
    }
    this.batch.push(cells);
    if (this.batch.length >= this.batchRows) this.flush();
  };

  end(): void {
    if (this.batch.length > 0 || this.guessing) this.flush();
    if (this.filled > 0) this.endBlock();
  }

  private begin(cells: readonly string[]): void {
    const { spill, format, decided } = this;
    const names = readHeader(cells, format.headerLine);
    this.names = names;
    this.blockRows = blockRowsFor(names.length);
    const builders = names.map(
      (name, position) => new ColumnBuilder({ name, position, blockRows: this.blockRows, spill }),
    );
    this.builders = decided ? builders.filter((builder) => decided.has(builder.options.position)) : builders;
    for (const builder of this.builders) builder.keepAs(decided?.get(builder.options.position) ?? { kind: 'nothing' });
    this.batchRows = this.guessing
      ? Math.max(50, Math.min(guessRows, Math.floor(guessCells / names.length)))
      : this.ordinaryBatchRows;
  }

  private get ordinaryBatchRows(): number {
    return Math.max(1, Math.min(256, Math.floor(batchCells / (this.names?.length ?? 1))));
  }

  private flush(): void {
    if (this.guessing) this.guess();
    const rows = this.batch;
    this.batch = [];
    for (let at = 0; at < rows.length;) {
      const taken = Math.min(rows.length - at, this.blockRows - this.filled);
      const part = taken === rows.length ? rows : rows.slice(at, at + taken);
      for (const builder of this.builders) builder.add(part, this.filled, this.fileMark);
      at += taken;
      this.filled += taken;
      this.rowCount += taken;
      if (this.filled === this.blockRows) this.endBlock();
    }
  }

  private guess(): void {
    for (const builder of this.builders) builder.gatherEvidence(this.batch);
    this.fileMark = fileMarkOf(
      this.builders.map((builder) => builder.evidence),
      this.format.delimiter,
    );
    for (const builder of this.builders) builder.keepAs(likelyFormOf(builder.evidence, this.fileMark));
    this.guessing = false;
    this.batchRows = this.ordinaryBatchRows;
  }

  private endBlock(): void {
    for (const builder of this.builders) builder.endBlock(this.filled);
    this.blockRowCounts.push(this.filled);
    this.filled = 0;
  }
}

async function runPass(path: string, pass: TablePass, format: FileFormat): Promise<void> {
  await parseRows(path, format, pass.addRow);
  pass.end();
}

/**
 * Reads a file into typed columns whose cells lie in the spill file. One pass; a second, for the columns concerned
 * only, when later rows show that a kind guessed from the first rows was wrong. Memory does not grow with the rows,
 * but for one column at a time while its statistics are taken.
 */
export async function readTable(path: string, spill: SpillFile): Promise<TableReading> {
  const { sample, complete } = await readSample(path, sampleBytes);
  const format = detectFormat(sample, complete);
  const pass = new TablePass(format, spill);
  await runPass(path, pass, format);
  if (pass.rowCount === 0) {
    throw new TableProblem(
      'file-empty',
      'The file has a header but no rows. Send a table with at least one row.',
      format.headerLine,
    );
  }
  const decimal = fileMarkOf(
    pass.builders.map((builder) => builder.evidence),
    format.delimiter,
  );
  const builders = await readAgainWhereWrong(path, pass.builders, { format, spill, decimal });
  return {
    rowCount: pass.rowCount,
    blockRowCounts: pass.blockRowCounts,
    columns: finishColumns(builders, pass.rowCount),
    format,
    decimal,
  };
}

interface SecondReading {
  readonly format: FileFormat;
  readonly spill: SpillFile;
  readonly decimal: DecimalMark;
}

async function readAgainWhereWrong(
  path: string,
  builders: readonly ColumnBuilder[],
  { format, spill, decimal }: SecondReading,
): Promise<readonly ColumnBuilder[]> {
  const wrong = new Map<number, CellForm>();
  for (const { evidence, form, options } of builders) {
    const decided = formOf(evidence, decimal);
    if (form.kind !== 'words' && !sameForm(form, decided, evidence)) wrong.set(options.position, decided);
  }
  if (wrong.size === 0) return builders;
  const pass = new TablePass(format, spill, wrong);
  await runPass(path, pass, format);
  const mended = new Map(pass.builders.map((builder) => [builder.options.position, builder]));
  return builders.map((builder) => mended.get(builder.options.position) ?? builder);
}
