import type { ComparedTable } from './compared-table';
import { renamedTable, renamesIn } from './renamed-table';

const table: ComparedTable = {
  rowCount: 1,
  columns: ['hull', 'beam'].map((name) => ({
    ...{ name, kind: 'numeric', unit: null, missingCount: 0, distinctCount: 1 },
  })),
  read: (name) => ({ name, kind: 'numeric', values: Float64Array.of(name === 'hull' ? 1 : 2) }),
};

describe('columns that were renamed', () => {
  it('are followed from step to step', () => {
    const steps = [
      { kind: 'rename', column: 'hull', to: 'shell' },
      { kind: 'drop-repeated-rows' },
      { kind: 'rename', column: 'shell', to: ' material ' },
      { kind: 'rename', column: 'beam', to: 'hull' },
    ] as const;
    expect([...renamesIn(steps)]).toEqual([
      ['hull', 'material'],
      ['beam', 'hull'],
    ]);
    expect(renamesIn([steps[0], { kind: 'rename', column: 'shell', to: 'hull' }]).size).toBe(0);
  });

  it('are read under their new names', () => {
    const renamed = renamedTable(
      table,
      new Map([
        ['hull', 'beam'],
        ['beam', 'hull'],
      ]),
    );
    expect(renamed.columns.map(({ name }) => name)).toEqual(['beam', 'hull']);
    expect(renamed.read('beam')).toMatchObject({ name: 'beam', values: Float64Array.of(1) });
  });

  it('keep their names where two would be called the same', () => {
    expect(renamedTable(table, new Map([['hull', 'beam']]))).toBe(table);
  });
});
