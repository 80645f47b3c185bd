import { DateForm, everyDateForm } from './date-cell';
import { DateReader } from './date-cell';
import { isMissing } from './missing-marks';
import { NumberClass, NumberReader, type DecimalMark } from './number-cell';

const bit = (numberClass: NumberClass): number => 1 << numberClass;
const classesAgainst: Readonly<Record<DecimalMark, number>> = {
  '.': bit(NumberClass.none) | bit(NumberClass.comma),
  ',': bit(NumberClass.none) | bit(NumberClass.point),
};
const markedClasses =
  bit(NumberClass.point) | bit(NumberClass.pointOrGroup) | bit(NumberClass.comma) | bit(NumberClass.commaOrGroup);

/** What all cells of a column have in common. Grows while the file is read; a kind is decided from it at the end. */
export class ColumnEvidence {
  /** Bits of the number classes seen. */
  numberClasses = 0;
  /** Date forms that every cell has. */
  dateForms: number = everyDateForm;

  get isEmpty(): boolean {
    return this.numberClasses === 0;
  }

  allowsMark(mark: DecimalMark): boolean {
    return !this.isEmpty && (this.numberClasses & classesAgainst[mark]) === 0;
  }

  /** Whether it matters which decimal mark is taken. */
  get hasMarks(): boolean {
    return (this.numberClasses & markedClasses) !== 0;
  }

  addText(text: string, readers: CellReaders): void {
    if (isMissing(text)) return;
    const numberClass = readers.numbers.read(text);
    this.numberClasses |= bit(numberClass);
    if (this.dateForms !== 0)
      this.dateForms &= numberClass === NumberClass.none ? readers.dates.read(text) : DateForm.none;
  }

  addNumber(numberClass: NumberClass): void {
    this.numberClasses |= bit(numberClass);
    this.dateForms = DateForm.none;
  }

  addDate(forms: number): void {
    this.numberClasses |= bit(NumberClass.none);
    this.dateForms &= forms;
  }
}

export interface CellReaders {
  readonly numbers: NumberReader;
  readonly dates: DateReader;
}

export const newCellReaders = (): CellReaders => ({ numbers: new NumberReader(), dates: new DateReader() });

/** How a column's cells are kept: `words` become a category or text once all of them are known. */
export type CellForm =
  | { readonly kind: 'nothing' }
  | { readonly kind: 'numeric'; readonly mark: DecimalMark }
  | { readonly kind: 'date'; readonly form: number }
  | { readonly kind: 'words' };

const isSingleForm = (forms: number): boolean => forms !== 0 && (forms & (forms - 1)) === 0;

/**
 * A date counts only when its order is certain over the whole column. `12/03/2026` alone could be either; such a
 * column stays words.
 */
export function formOf(evidence: ColumnEvidence, fileMark: DecimalMark): CellForm {
  if (evidence.isEmpty) return { kind: 'nothing' };
  const marks = (['.', ','] as const).filter((mark) => evidence.allowsMark(mark));
  if (marks.length > 0) return { kind: 'numeric', mark: marks.includes(fileMark) ? fileMark : marks[0] };
  return isSingleForm(evidence.dateForms) ? { kind: 'date', form: evidence.dateForms } : { kind: 'words' };
}

/** The form to begin with: as `formOf`, but an order of day and month that is open yet is taken to become clear. */
export function likelyFormOf(evidence: ColumnEvidence, fileMark: DecimalMark): CellForm {
  const form = formOf(evidence, fileMark);
  const bothOrders = DateForm.dayFirst | DateForm.monthFirst;
  return form.kind === 'words' && evidence.dateForms === bothOrders ? { kind: 'date', form: DateForm.dayFirst } : form;
}

/**
 * The file's decimal mark, from the columns that leave no doubt. Without any: a comma where a column has `1,234`
 * and the delimiter is not the comma, for such files come from places that write so; else a point.
 */
export function fileMarkOf(columns: readonly ColumnEvidence[], delimiter: string): DecimalMark {
  const certain = (mark: DecimalMark, other: DecimalMark): number =>
    columns.filter((column) => column.allowsMark(mark) && !column.allowsMark(other)).length;
  const [points, commas] = [certain('.', ','), certain(',', '.')];
  if (points !== commas) return points > commas ? '.' : ',';
  const doubtful = columns.some(
    (column) => column.allowsMark(',') && (column.numberClasses & bit(NumberClass.commaOrGroup)) !== 0,
  );
  return delimiter !== ',' && doubtful ? ',' : '.';
}

export function sameForm(kept: CellForm, decided: CellForm, evidence: ColumnEvidence): boolean {
  if (kept.kind === 'numeric' && decided.kind === 'numeric') return kept.mark === decided.mark || !evidence.hasMarks;
  if (kept.kind === 'date' && decided.kind === 'date') return kept.form === decided.form;
  return kept.kind === decided.kind;
}
