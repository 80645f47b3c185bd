import { codesToCells, numbersToCells, textsToCells } from '../cell-blocks';
import type { CellReaders, ColumnEvidence } from './column-evidence';
import { DateForm } from './date-cell';
import { maximumCellLength, maximumLevels } from './limits';
import { usualMarks, type MissingMarks } from './missing-marks';
import { NumberClass, type DecimalMark } from './number-cell';
import { plainDays } from './plain-date';
import { TableProblem } from './table-problem';

/** Rows of text as the parser gives them. */
export type TextRows = readonly (readonly string[])[];

/** Where rows of a batch go: their column in the file, and their place in the block. */
export interface BatchPlace {
  readonly position: number;
  readonly start: number;
}

/** Takes the cells of one column, a batch at a time, into the block that is open. */
export interface CellStore {
  add(rows: TextRows, place: BatchPlace): void;
  /** Closes the block: its cells as they are stored. */
  takeBlock(rowCount: number): Uint8Array;
  /** Cells so far that are neither missing nor fit the form. */
  readonly unreadableCount: number;
}

/** Plain numbers: no unit, and no mark that is a number. What turns up beside them shows in the evidence. */
export class NumberStore implements CellStore {
  readonly unreadableCount = 0;
  private readonly block: Float64Array;

  constructor(
    private readonly mark: DecimalMark,
    private readonly evidence: ColumnEvidence,
    private readonly readers: CellReaders,
    blockRows: number,
  ) {
    this.block = new Float64Array(blockRows).fill(NaN);
  }

  add(rows: TextRows, { position, start }: BatchPlace): void {
    const { numbers } = this.readers;
    const { block, evidence } = this;
    const byPoint = this.mark === '.';
    for (let row = 0; row < rows.length; row++) {
      const text = rows[row][position];
      const numberClass = numbers.read(text);
      if (numberClass === NumberClass.none) {
        evidence.addText(text, this.readers);
        block[start + row] = NaN;
      } else {
        evidence.addNumber(numberClass);
        block[start + row] = byPoint ? numbers.pointValue : numbers.commaValue;
      }
    }
  }

  takeBlock(rowCount: number): Uint8Array {
    return numbersToCells(this.block.subarray(0, rowCount));
  }
}

/** Dates repeat, so each way of writing one is read once, up to a bound on what is remembered. */
const rememberedDates = 50_000;

export class DateStore implements CellStore {
  unreadableCount = 0;
  private readonly block: Float64Array;
  private readonly known = new Map<string, number>();
  /** Whether a plainly written date can mean nothing else here: no mark that was told may look like one. */
  private readonly plain: boolean;

  constructor(
    private readonly forms: number,
    private readonly evidence: ColumnEvidence,
    private readonly readers: CellReaders,
    blockRows: number,
  ) {
    this.block = new Float64Array(blockRows).fill(NaN);
    this.plain = forms === DateForm.iso && evidence.plan.marks === usualMarks;
  }

  add(rows: TextRows, { position, start }: BatchPlace): void {
    let someArePlain = false;
    for (let row = 0; row < rows.length; row++) {
      const text = rows[row][position];
      const plain = this.plain ? plainDays(text) : NaN;
      if (plain === plain) {
        someArePlain = true;
        this.block[start + row] = plain;
        continue;
      }
      const days = this.known.get(text) ?? this.readNew(text);
      if (days === Infinity) this.unreadableCount++;
      this.block[start + row] = days === Infinity ? NaN : days;
    }
    if (someArePlain) this.evidence.addDate(DateForm.iso);
  }

  takeBlock(rowCount: number): Uint8Array {
    return numbersToCells(this.block.subarray(0, rowCount));
  }

  /** NaN for a missing cell, infinity for one that does not fit. */
  private readNew(text: string): number {
    if (this.evidence.plan.marks.isMissing(text)) return NaN;
    const { dates } = this.readers;
    this.evidence.addDate(dates.read(text));
    const read = dates.valueOf(this.forms);
    const days = Number.isNaN(read) ? Infinity : read;
    if (this.known.size < rememberedDates) this.known.set(text, days);
    return days;
  }
}

function requireCellLength(text: string, name: string): void {
  if (text.length <= maximumCellLength) return;
  throw new TableProblem(
    'file-not-table',
    `A cell of the column “${name.slice(0, 60)}” holds ${text.length} characters; ${maximumCellLength} is the most. A quotation mark may be left open above it, or the file is not a table.`,
  );
}

/** Words as numbers of a dictionary, as long as there are not too many different ones. */
export class CodeStore implements CellStore {
  readonly unreadableCount = 0;
  private readonly block: Int32Array;
  private readonly codes = new Map<string, number>();
  readonly levels: string[] = [];

  constructor(
    private readonly name: string,
    private readonly marks: MissingMarks,
    blockRows: number,
  ) {
    this.block = new Int32Array(blockRows).fill(-1);
  }

  /** More different words than a category may have: go on with a `TextStore`. */
  get isFull(): boolean {
    return this.levels.length > maximumLevels;
  }

  add(rows: TextRows, { position, start }: BatchPlace): void {
    for (let row = 0; row < rows.length; row++) {
      const text = rows[row][position];
      this.block[start + row] = this.codes.get(text) ?? this.codeNew(text);
    }
  }

  takeBlock(rowCount: number): Uint8Array {
    return codesToCells(this.block.subarray(0, rowCount));
  }

  private codeNew(text: string): number {
    requireCellLength(text, this.name);
    const code = this.marks.isMissing(text) ? -1 : this.levels.push(text) - 1;
    this.codes.set(text, code);
    return code;
  }
}

export const decodeWords = (codes: Int32Array, levels: readonly string[]): (string | null)[] =>
  Array.from(codes, (code) => (code < 0 ? null : levels[code]));

export class TextStore implements CellStore {
  readonly unreadableCount = 0;
  private readonly block: (string | null)[];

  constructor(
    private readonly name: string,
    private readonly marks: MissingMarks,
    begun: readonly (string | null)[],
  ) {
    this.block = [...begun];
  }

  add(rows: TextRows, { position, start }: BatchPlace): void {
    for (let row = 0; row < rows.length; row++) {
      const text = rows[row][position];
      requireCellLength(text, this.name);
      this.block[start + row] = this.marks.isMissing(text) ? null : text;
    }
  }

  takeBlock(rowCount: number): Uint8Array {
    const cells = textsToCells(this.block.slice(0, rowCount));
    this.block.length = 0;
    return cells;
  }
}
