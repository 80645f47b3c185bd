import type { components } from '../../../../openapi/types/desk';
import type { RecordColumn } from '../../regression/records';
import { DateForm, DateReader, dateText } from '../reading/date-cell';
import { isMissing } from '../reading/missing-marks';
import { NumberClass, NumberReader } from '../reading/number-cell';

type ColumnKind = components['schemas']['ColumnKind'];
type DateOrder = components['schemas']['DateOrder'];

export interface KindChange {
  readonly column: RecordColumn;
  /** Cells that do not fit the new kind and are missing for that reason. */
  readonly unreadable: number;
}

/** Forms in which a date of each order may be written; months by name leave no doubt in any. */
const formsOf: Readonly<Record<DateOrder, readonly number[]>> = {
  'year-first': [DateForm.iso, DateForm.isoMonth, DateForm.named],
  'day-first': [DateForm.dayFirst, DateForm.named],
  'month-first': [DateForm.monthFirst, DateForm.named],
};

/** Every cell as it would be written in a file; null is missing. */
function textsOf(column: RecordColumn): (string | null)[] {
  if (column.kind === 'category') return Array.from(column.codes, (code) => (code < 0 ? null : column.levels[code]));
  if (column.kind === 'text') return [...column.values];
  const write = column.kind === 'date' ? dateText : String;
  return Array.from(column.values, (value) => (value === value ? write(value) : null));
}

/** NaN for what cannot be read. */
function valuesFrom(
  column: RecordColumn,
  readOne: (text: string) => number,
): { values: Float64Array; unreadable: number } {
  let unreadable = 0;
  const values = Float64Array.from(textsOf(column), (text) => {
    if (text === null || isMissing(text)) return NaN;
    const value = readOne(text);
    if (value !== value) unreadable++;
    return value;
  });
  return { values, unreadable };
}

function readNumber(numbers: NumberReader, text: string): number {
  return numbers.read(text) === NumberClass.none ? NaN : numbers.pointValue;
}

function readDate(dates: DateReader, text: string, order: DateOrder): number {
  const forms = dates.read(text);
  const form = formsOf[order].find((one) => (forms & one) !== 0);
  return form === undefined ? NaN : dates.valueOf(form);
}

function toCategory(column: RecordColumn): RecordColumn {
  const codeOf = new Map<string, number>();
  const codes = Int32Array.from(textsOf(column), (text) => {
    if (text === null) return -1;
    const known = codeOf.get(text) ?? codeOf.size;
    codeOf.set(text, known);
    return known;
  });
  return { name: column.name, kind: 'category', codes, levels: [...codeOf.keys()] };
}

/** The same column as another kind. A number is written with a decimal point. Pure; cost: one pass. */
export function changeKind(column: RecordColumn, to: ColumnKind, order: DateOrder = 'year-first'): KindChange {
  const { name } = column;
  if (to === column.kind) return { column, unreadable: 0 };
  if (to === 'category') return { column: toCategory(column), unreadable: 0 };
  if (to === 'text') return { column: { name, kind: 'text', values: textsOf(column) }, unreadable: 0 };
  const [numbers, dates] = [new NumberReader(), new DateReader()];
  const { values, unreadable } = valuesFrom(column, (text) =>
    to === 'numeric' ? readNumber(numbers, text) : readDate(dates, text, order),
  );
  return { column: { name, kind: to, values }, unreadable };
}
