import type { RecordColumn, RecordTable } from '../../regression/records';
import { maximumLevels } from '../reading/limits';
import { applySteps } from './apply-steps';
import { changeKind } from './set-kind';

const text = (...values: (string | null)[]): RecordColumn => ({ name: 'a', kind: 'text', values });
const category = (levels: string[], ...codes: number[]): RecordColumn => ({
  ...{ name: 'a', kind: 'category', levels },
  codes: Int32Array.from(codes),
});
const numeric = (...values: number[]): RecordColumn => ({
  ...{ name: 'a', kind: 'numeric', unit: 'm' },
  values: Float64Array.from(values),
});
/** Days from 1970-01-01 to 2019-04-03 (written the other way round, 03/04 is 4 March, 30 days before): 49 years of 365 days, 12 leap days, 92 days. */
const thirdOfApril = 49 * 365 + 12 + 92;
const date = (...values: number[]): RecordColumn => ({ name: 'a', kind: 'date', values: Float64Array.from(values) });

describe('a column of another kind', () => {
  it('reads numbers with a decimal point, and counts what is no number; marks of nothing are missing', () => {
    const given = text('7.5', ' 1,250.5 ', 'n/a', null, '7,5', 'twelve', '1e3');
    expect(changeKind(given, 'numeric')).toEqual({
      column: { name: 'a', kind: 'numeric', values: Float64Array.of(7.5, 1250.5, NaN, NaN, NaN, NaN, 1000) },
      unreadable: 2,
    });
  });

  it('reads dates in the order told, months by name in any', () => {
    const given = category(['03/04/2019', '3 April 2019', '2019-04-03'], 0, 1, 2, -1);
    const values = (order?: 'day-first' | 'month-first') => changeKind(given, 'date', order);
    const asDate = (...days: number[]) => date(...days);
    expect(values('day-first')).toEqual({ column: asDate(thirdOfApril, thirdOfApril, NaN, NaN), unreadable: 1 });
    expect(values('month-first')).toEqual({ column: asDate(thirdOfApril - 30, thirdOfApril, NaN, NaN), unreadable: 1 });
    expect(values()).toEqual({ column: asDate(NaN, thirdOfApril, thirdOfApril, NaN), unreadable: 1 });
  });

  it('makes levels in the order in which they come, and loses the unit', () => {
    expect(changeKind(numeric(2, NaN, -0.5, 2), 'category')).toEqual({
      column: { name: 'a', kind: 'category', levels: ['2', '-0.5'], codes: Int32Array.of(0, -1, 1, 0) },
      unreadable: 0,
    });
  });

  it('writes dates and numbers as text that reads back the same', () => {
    const numbers = numeric(0.1, -1e-7, 1e21, NaN, 123456789.125);
    const days = date(thirdOfApril, thirdOfApril + 0.5, NaN);
    const back = (column: RecordColumn) => changeKind(changeKind(column, 'text').column, column.kind).column;
    expect(back(numbers)).toEqual({ ...numbers, unit: undefined });
    expect(back(days)).toEqual(days);
  });

  it('is itself when it has the kind already, with its unit', () => {
    const given = numeric(1, 2);
    expect(changeKind(given, 'numeric')).toEqual({ column: given, unreadable: 0 });
  });

  it('is refused as a category of more levels than one can have', () => {
    const values = Array.from({ length: maximumLevels + 1 }, (_, row) => `boat ${row}`);
    const table: RecordTable = { rowCount: values.length, columns: [text(...values)] };
    expect(() => applySteps(table, [{ kind: 'set-kind', column: 'a', to: 'category' }])).toThrow(
      'a has 10,001 different values; a category has at most 10,000 levels.',
    );
    const long: RecordTable = { rowCount: 1, columns: [text('x'.repeat(201))] };
    expect(() => applySteps(long, [{ kind: 'set-kind', column: 'a', to: 'category' }])).toThrow('too long for a level');
  });

  it('tells how many cells became missing on the way', () => {
    const table: RecordTable = { rowCount: 3, columns: [text('1', 'x', 'y')] };
    expect(applySteps(table, [{ kind: 'set-kind', column: 'a', to: 'numeric' }]).effects[0].told).toBe(
      'Made a a number; 2 rows could not be read so and became missing.',
    );
  });
});
