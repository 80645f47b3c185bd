import type { RecordTable } from '../../regression/records';
import { bindCondition, bindNumber } from './formula-evaluation';
import { FormulaError } from './formula-tokens';

const table: RecordTable = {
  rowCount: 3,
  columns: [
    { name: 'length', kind: 'numeric', values: Float64Array.of(8, 12, NaN) },
    { name: 'beam (m)', kind: 'numeric', values: Float64Array.of(2, 3, 4) },
    { name: 'hull', kind: 'category', codes: Int32Array.of(0, 1, -1), levels: ['steel', 'oak'] },
    { name: 'launched', kind: 'date', values: Float64Array.of(0, 366, NaN) },
  ],
};
const rows = [0, 1, 2];
const numbers = (formula: string) => rows.map(bindNumber(formula, table));
const truths = (formula: string) => rows.map(bindCondition(formula, table));

describe('a formula', () => {
  it.each([
    ['length * [beam (m)] + 1', [17, 37, NaN]],
    ['-2 ^ 2', [-4, -4, -4]],
    ['2 ^ 3 ^ 2', [512, 512, 512]],
    ['10 - 4 - 3', [3, 3, 3]],
    ['2 + 3 * 4 / (1 + 1)', [8, 8, 8]],
    ['max(length, [beam (m)], 9)', [9, 12, NaN]],
    ['year(launched) + month(launched)', [1971, 1972, NaN]],
    ['1 / ([beam (m)] - 2)', [NaN, 1, 0.5]],
    ['log(0 - 1)', [NaN, NaN, NaN]],
  ])('%s gives a number for each row', (formula, expected) => {
    expect(numbers(formula)).toEqual(expected);
  });

  it.each([
    ['length > 8', [false, true, false]],
    ['not length > 8', [true, false, true]],
    ['length is missing or hull = "steel"', [true, false, true]],
    ['hull is not missing and [beam (m)] <> 3', [true, false, false]],
    ['launched >= "1971-01-01"', [false, true, false]],
    ['hull <> "oak"', [true, false, false]],
  ])('%s holds or not for each row, never by a missing value', (formula, expected) => {
    expect(truths(formula)).toEqual(expected);
  });

  it.each([
    '',
    'length >',
    'lenght > 2',
    'length > "x"',
    '(length > 2',
    'length ! 2',
    'length',
    'constructor(1) > 2',
    'toString(1) > 2',
    'length > 2; 1',
    'a'.repeat(501),
    'launched > "soon"',
    'min(1) > 0',
    'length length',
  ])('refuses %j and says where', (formula) => {
    expect(() => bindCondition(formula, table)).toThrow(FormulaError);
  });

  it('names any column and any level, a bracket or a quotation mark in them written twice', () => {
    const odd: RecordTable = {
      rowCount: 2,
      columns: [
        { name: 'beam [m]', kind: 'numeric', values: Float64Array.of(1, 2) },
        { name: ']', kind: 'category', codes: Int32Array.of(0, 1), levels: ['3" planks', '"'] },
      ],
    };
    const met = (formula: string) => [0, 1].map(bindCondition(formula, odd));
    expect(met('[beam [m]]] > 1')).toEqual([false, true]);
    expect(met('[]]] = "3"" planks"')).toEqual([true, false]);
    expect(met('[]]] = """"')).toEqual([false, true]);
    expect(met('[]]] = ""')).toEqual([false, false]);
  });

  it('survives the deepest nesting that fits', () => {
    expect(numbers(`${'('.repeat(249)}1${')'.repeat(249)}`)).toEqual([1, 1, 1]);
  });
});
