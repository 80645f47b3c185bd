import { numbersToCells } from '../cell-blocks';
import type { CellForm } from './cell-form';
import type { BatchPlace, CellStore, TextRows } from './cell-stores';
import type { CellReaders, ColumnEvidence } from './column-evidence';
import type { ColumnPlan } from './column-plan';
import { NumberClass } from './number-cell';
import { areConvertible, conversionOf, converted, type Conversion, type Unit } from './units';

type NumericForm = Extract<CellForm, { readonly kind: 'numeric' }>;

/** Whether a numeric column needs more than plain numbers: units in its cells, marks that are numbers, a forced kind. */
export const needsMixedStore = (form: NumericForm, plan: ColumnPlan): boolean =>
  form.unit !== null || plan.kind === 'numeric' || plan.marks.numbersUnder(form.mark) !== null;

/** Zeros in front make a code of a number, unless the column was chosen to be numeric. */
const leadingZeros = /^(\s*[+-]?)0+(?=\d)/;

/**
 * Numbers with their units, converted to the form's. Plain numbers are in the column's unit already. What does not
 * fit is missing and counted.
 */
export class MixedNumberStore implements CellStore {
  unreadableCount = 0;
  private readonly block: Float64Array;
  private readonly markNumbers: ReadonlySet<number> | null;
  private readonly conversions = new Map<Unit, Conversion | null>();
  private readonly forced: boolean;

  constructor(
    private readonly form: NumericForm,
    private readonly evidence: ColumnEvidence,
    private readonly readers: CellReaders,
    blockRows: number,
  ) {
    const { marks, kind } = evidence.plan;
    this.block = new Float64Array(blockRows).fill(NaN);
    this.markNumbers = marks.numbersUnder(form.mark);
    this.forced = kind === 'numeric';
  }

  add(rows: TextRows, { position, start }: BatchPlace): void {
    for (let row = 0; row < rows.length; row++) this.block[start + row] = this.valueOf(rows[row][position]);
  }

  takeBlock(rowCount: number): Uint8Array {
    return numbersToCells(this.block.subarray(0, rowCount));
  }

  private valueOf(text: string): number {
    const numberClass = this.readers.numbers.read(text);
    const value = numberClass === NumberClass.none ? NaN : this.lastValue;
    if (Number.isNaN(value)) return this.unusualValueOf(text, numberClass);
    if (this.markNumbers?.has(value)) return NaN;
    this.evidence.addNumber(numberClass);
    return value;
  }

  private unusualValueOf(text: string, numberClass: NumberClass): number {
    const { evidence } = this;
    if (evidence.plan.marks.isMissing(text)) return NaN;
    const value = numberClass === NumberClass.none ? this.withUnit(text) : NaN;
    if (numberClass !== NumberClass.none) evidence.addNumber(numberClass);
    if (Number.isNaN(value)) this.unreadableCount++;
    return value;
  }

  private get lastValue(): number {
    const { numbers } = this.readers;
    return this.form.mark === '.' ? numbers.pointValue : numbers.commaValue;
  }

  private withUnit(text: string): number {
    const { units } = this.readers;
    const numberClass = units.read(text);
    const { unit } = units;
    this.evidence.addNeither(numberClass, unit);
    if (!unit) return this.forced ? this.withoutZeros(text) : NaN;
    const conversion = this.conversionFrom(unit);
    return conversion ? converted(this.lastValue, conversion) : NaN;
  }

  private withoutZeros(text: string): number {
    const digits = text.replace(leadingZeros, '$1');
    return digits !== text && this.readers.numbers.read(digits) !== NumberClass.none ? this.lastValue : NaN;
  }

  private conversionFrom(unit: Unit): Conversion | null {
    let conversion = this.conversions.get(unit);
    if (conversion === undefined) {
      const target = this.form.unit;
      conversion = target && areConvertible(unit, target) ? conversionOf(unit, target) : null;
      this.conversions.set(unit, conversion);
    }
    return conversion;
  }
}
