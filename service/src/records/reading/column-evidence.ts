import type { ColumnPlan } from './column-plan';
import { DateForm, DateReader, everyDateForm } from './date-cell';
import { NumberClass, NumberReader, type DecimalMark } from './number-cell';
import { UnitReader } from './unit-cell';
import type { Unit } from './units';

const bit = (numberClass: NumberClass): number => 1 << numberClass;
const noneBit = bit(NumberClass.none);
const classesAgainst: Readonly<Record<DecimalMark, number>> = {
  '.': noneBit | bit(NumberClass.comma),
  ',': noneBit | bit(NumberClass.point),
};
const markedClasses =
  bit(NumberClass.point) | bit(NumberClass.pointOrGroup) | bit(NumberClass.comma) | bit(NumberClass.commaOrGroup);
const eitherOrder = DateForm.dayFirst | DateForm.monthFirst;

export interface CellReaders {
  readonly numbers: NumberReader;
  readonly units: UnitReader;
  readonly dates: DateReader;
}

export function newCellReaders(): CellReaders {
  const numbers = new NumberReader();
  return { numbers, units: new UnitReader(numbers), dates: new DateReader() };
}

/** What all cells of a column have in common. Grows while the file is read; a kind is decided from it at the end. */
export class ColumnEvidence {
  /** Bits of the number classes seen, of numbers with a unit too. */
  numberClasses = 0;
  /** Date forms that every cell has. */
  dateForms: number = everyDateForm;
  /** `dayFirst` and `monthFirst`, where a cell can be read in that order only. */
  certainOrders = 0;
  /** Units that stand in the cells, with the number of cells. */
  readonly units = new Map<Unit, number>();

  constructor(readonly plan: ColumnPlan) {}

  get isEmpty(): boolean {
    return this.numberClasses === 0;
  }

  /** Whether its cells, those apart that need not fit, are numbers under this decimal mark. */
  allowsMark(mark: DecimalMark): boolean {
    const { kind } = this.plan;
    if (this.isEmpty || (kind !== null && kind !== 'numeric')) return false;
    const against = kind === 'numeric' ? classesAgainst[mark] & ~noneBit : classesAgainst[mark];
    return (this.numberClasses & against) === 0;
  }

  /** Whether it matters which decimal mark is taken. */
  get hasMarks(): boolean {
    return (this.numberClasses & markedClasses) !== 0;
  }

  get hasDoubtfulCommas(): boolean {
    return (this.numberClasses & bit(NumberClass.commaOrGroup)) !== 0;
  }

  addText(text: string, readers: CellReaders): void {
    const { plan } = this;
    if (plan.marks.isMissing(text)) return;
    const numberClass = readers.numbers.read(text);
    const datesMatter = this.dateForms !== 0 || plan.kind === 'date';
    if (numberClass !== NumberClass.none) this.addNumber(numberClass);
    else if (datesMatter && readers.dates.read(text) !== 0) this.addDate(readers.dates.forms);
    else this.addNeither(readers.units.read(text), readers.units.unit);
  }

  addNumber(numberClass: NumberClass): void {
    this.numberClasses |= bit(numberClass);
    this.dateForms = DateForm.none;
  }

  addDate(forms: number): void {
    this.numberClasses |= noneBit;
    this.dateForms &= forms;
    const orders = forms & eitherOrder;
    if (orders !== eitherOrder) this.certainOrders |= orders;
  }

  /** Of a cell with a number and a unit, or of a word (`none` and null). */
  addNeither(numberClass: NumberClass, unit: Unit | null): void {
    this.addNumber(numberClass);
    if (unit) this.units.set(unit, (this.units.get(unit) ?? 0) + 1);
  }
}
