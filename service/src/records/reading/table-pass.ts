import { blockRowsFor } from '../cell-blocks';
import { fileMarkOf, likelyFormOf, type CellForm } from './cell-form';
import { ColumnBuilder } from './column-builder';
import { planColumns, requireColumnsLeft, type ColumnPlan } from './column-plan';
import type { FileFormat } from './file-format';
import { readHeader } from './header';
import { guessRows } from './limits';
import type { DecimalMark } from './number-cell';
import type { BaseColumn, ReadingChoices } from './reading-choices';
import type { SpillFile } from './spill-file';

/** Cells of the rows that a first guess rests on, and of a batch: bounds on what is held as text. */
const guessCells = 150_000;
const batchCells = 8192;

export interface TablePassParts {
  readonly format: FileFormat;
  readonly spill: SpillFile;
  readonly choices: ReadingChoices;
  readonly base?: readonly BaseColumn[];
}

/** One pass over the file into blocks of cells. */
export class TablePass {
  plans: readonly ColumnPlan[] = [];
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
    private readonly parts: TablePassParts,
    private readonly decided?: ReadonlyMap<number, CellForm>,
  ) {
    this.guessing = decided === undefined;
  }

  get hasHeader(): boolean {
    return this.names !== null;
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
    const { format, choices, base } = this.parts;
    const names = readHeader(cells, format.headerLine);
    this.names = names;
    this.blockRows = blockRowsFor(names.length);
    this.plans = planColumns(names, choices, base);
    requireColumnsLeft(this.plans, base);
    this.builders = this.plans.filter((plan) => this.isRead(plan)).map((plan) => this.newBuilder(plan));
    this.batchRows = this.guessing
      ? Math.max(50, Math.min(guessRows, Math.floor(guessCells / names.length)))
      : this.ordinaryBatchRows;
  }

  private isRead({ position, setAside }: ColumnPlan): boolean {
    return !setAside && (!this.decided || this.decided.has(position));
  }

  private newBuilder(plan: ColumnPlan): ColumnBuilder {
    const { name, position } = plan;
    const { spill } = this.parts;
    const builder = new ColumnBuilder({ name, position, plan, blockRows: this.blockRows, spill });
    builder.keepAs(this.decided?.get(position) ?? { kind: 'nothing' });
    return builder;
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
    const evidence = this.builders.map((builder) => builder.evidence);
    this.fileMark = this.parts.choices.decimal ?? fileMarkOf(evidence, this.parts.format.delimiter);
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
