import type { NumericRecordColumn, RecordTable } from '../../regression/records';
import { applySteps, StepProblem } from './apply-steps';
import type { MendStep } from './step-change';

const table = (): RecordTable => ({
  rowCount: 4,
  columns: [
    { name: 'length', kind: 'numeric', unit: 'm', values: Float64Array.of(8, 9, 30, NaN) },
    { name: 'hull', kind: 'category', codes: Int32Array.of(0, 1, 0, 2), levels: ['steel', 'oak', 'larch'] },
    { name: 'remark', kind: 'text', values: ['a', null, 'c', 'd'] },
  ],
});
const after = (...steps: MendStep[]) => applySteps(table(), steps);
const column = (name: string, ...steps: MendStep[]) =>
  after(...steps).table.columns.find((found) => found.name === name);

describe('a mending step', () => {
  it('leaves the table that it is given as it is', () => {
    const given = table();
    applySteps(given, [
      { kind: 'drop-rows', where: 'length > 8' },
      { kind: 'map-levels', column: 'hull', levels: { oak: 'wood' } },
    ]);
    expect(given).toEqual(table());
  });

  it('renames a column, and later steps know the new name', () => {
    expect(
      after({ kind: 'rename', column: 'length', to: 'loa' }, { kind: 'set-unit', column: 'loa', unit: 'ft' }).table
        .columns[0],
    ).toMatchObject({ name: 'loa', unit: 'ft' });
  });

  it('converts the rows chosen by condition, by number, or by both', () => {
    const convert = { kind: 'convert-unit', column: 'length', factor: 0.5 } as const;
    expect(column('length', convert)).toMatchObject({ values: Float64Array.of(4, 4.5, 15, NaN) });
    expect(column('length', { ...convert, where: 'length > 8' })).toMatchObject({
      values: Float64Array.of(8, 4.5, 15, NaN),
    });
    expect(column('length', { ...convert, rows: [1, 2] })).toMatchObject({ values: Float64Array.of(4, 4.5, 30, NaN) });
    expect(column('length', { ...convert, rows: [1, 2], where: 'length > 8' })).toMatchObject({
      values: Float64Array.of(8, 4.5, 30, NaN),
    });
  });

  it('maps levels, and leaves out those that no row has any more', () => {
    expect(
      column('hull', { kind: 'map-levels', column: 'hull', levels: { oak: 'wood', larch: 'wood' } }),
    ).toMatchObject({ levels: ['steel', 'wood'], codes: Int32Array.of(0, 1, 0, 1) });
  });

  it('joins rare levels', () => {
    expect(column('hull', { kind: 'join-rare-levels', column: 'hull', fewerThan: 2, into: 'other' })).toMatchObject({
      levels: ['steel', 'other'],
      codes: Int32Array.of(0, 1, 0, 1),
    });
  });

  it('sets cells of every kind to missing', () => {
    const rows = [3];
    expect(column('length', { kind: 'set-missing', column: 'length', rows })).toMatchObject({
      values: Float64Array.of(8, 9, NaN, NaN),
    });
    expect(column('hull', { kind: 'set-missing', column: 'hull', where: 'hull = "oak"' })).toMatchObject({
      levels: ['steel', 'larch'],
      codes: Int32Array.of(0, -1, 0, 1),
    });
    expect(column('remark', { kind: 'set-missing', column: 'remark', rows })).toMatchObject({
      values: ['a', null, null, 'd'],
    });
  });

  it('drops rows from every column', () => {
    const { table: left, effects } = after({ kind: 'drop-rows', where: 'length is missing or length > 20' });
    expect(left.rowCount).toBe(2);
    expect(left.columns.map((found) => (found.kind === 'category' ? found.codes : found.values).length)).toEqual([
      2, 2, 2,
    ]);
    expect(effects).toEqual([{ told: 'Dropped 2 rows where length is missing or length > 20.', rowsConcerned: 2 }]);
  });

  it('drops every repeated row, however many there are', () => {
    const values = Float64Array.from({ length: 500 }, (_, row) => row % 3);
    const repeated: RecordTable = { rowCount: 500, columns: [{ name: 'a', kind: 'numeric', values }] };
    expect(applySteps(repeated, [{ kind: 'drop-repeated-rows' }]).table.columns[0]).toMatchObject({
      values: Float64Array.of(0, 1, 2),
    });
  });

  it('adds a column by formula', () => {
    expect(column('double', { kind: 'derive', name: 'double', formula: 'length * 2', unit: 'm' })).toMatchObject({
      unit: 'm',
      values: Float64Array.of(16, 18, 60, NaN),
    });
  });

  /**
   * Published: National Bureau of Standards, "Refinement of Values for the Yard and the Pound", Federal Register
   * 24 FR 5348 (1 July 1959): 1 yard is 0.9144 metre and 1 pound 0.45359237 kilogram, exactly. A foot is a third of
   * a yard, an inch a twelfth of a foot.
   */
  it.each([
    ['feet to metres', 0.3048, 3, 0.9144],
    ['inches to metres', 0.0254, 36, 0.9144],
    ['pounds to kilograms', 0.45359237, 1, 0.45359237],
    ['pounds to tonnes', 0.00045359237, 1000, 0.45359237],
  ])('takes readings from %s by the exact factor', (_what, factor, reading, expected) => {
    const given: RecordTable = {
      rowCount: 1,
      columns: [{ name: 'a', kind: 'numeric', values: Float64Array.of(reading) }],
    };
    const { table: mended } = applySteps(given, [{ kind: 'convert-unit', column: 'a', factor, unit: 'SI' }]);
    const [{ values, unit }] = mended.columns as [NumericRecordColumn];
    expect(Math.abs(values[0] - expected)).toBeLessThanOrEqual(expected * Number.EPSILON);
    expect(unit).toBe('SI');
  });

  it('tells how many rows each step is about, and nothing of rows where it is about a column', () => {
    const { effects } = after(
      { kind: 'convert-unit', column: 'length', factor: 0.5, where: 'length > 8' },
      { kind: 'map-levels', column: 'hull', levels: { oak: 'wood', larch: 'wood' } },
      { kind: 'join-rare-levels', column: 'hull', fewerThan: 3, into: 'any' },
      { kind: 'set-missing', column: 'remark', rows: [1, 4] },
      { kind: 'drop-repeated-rows' },
      { kind: 'set-kind', column: 'length', to: 'text' },
      { kind: 'set-aside', column: 'remark' },
    );
    expect(effects.map(({ rowsConcerned }) => rowsConcerned)).toEqual([2, 2, 4, 2, 0, null, null]);
  });

  it('says after each step how many are done', () => {
    const told: number[] = [];
    const twice: MendStep[] = [
      { kind: 'drop-rows', rows: [1] },
      { kind: 'drop-rows', rows: [1] },
    ];
    applySteps(table(), twice, (done) => told.push(done));
    expect(told).toEqual([1, 2]);
    expect(after(...twice).table.columns[0]).toMatchObject({ values: Float64Array.of(30, NaN) });
  });

  it.each<[string, MendStep]>([
    ['a column that is not there', { kind: 'set-aside', column: 'beam' }],
    ['a name that is in use', { kind: 'rename', column: 'length', to: 'hull' }],
    ['a unit for words', { kind: 'set-unit', column: 'hull', unit: 'm' }],
    ['levels of numbers', { kind: 'map-levels', column: 'length', levels: { a: 'b' } }],
    ['a level that is not there', { kind: 'map-levels', column: 'hull', levels: { glass: 'b' } }],
    ['no choice of rows', { kind: 'drop-rows' }],
    ['rows beyond the end', { kind: 'drop-rows', rows: [5] }],
    ['every row', { kind: 'drop-rows', where: 'hull is not missing' }],
    ['a factor that wipes out every reading', { kind: 'convert-unit', column: 'length', factor: 0 }],
    ['a factor beyond what a number can hold', { kind: 'convert-unit', column: 'length', factor: 1e308 }],
    ['a blank name', { kind: 'rename', column: 'length', to: '  ' }],
    ['a kind that nothing in the column has', { kind: 'set-kind', column: 'hull', to: 'date' }],
    ['a formula that does not fit', { kind: 'derive', name: 'x', formula: 'hull + 1' }],
  ])('refuses %s and says which step it is', (_what, step) => {
    expect(() => after({ kind: 'set-aside', column: 'remark' }, step)).toThrow(expect.objectContaining({ step: 1 }));
    expect(() => after(step)).toThrow(StepProblem);
  });
});
