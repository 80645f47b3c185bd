import fc from 'fast-check';
import type { RecordColumn, RecordTable } from '../../../regression/records';
import { compareTables, type TableComparison } from './compare-tables';
import type { ComparedTable } from './compared-table';

type Row = readonly [id: number, hull: string, length: number];

function facts(column: RecordColumn) {
  const cells = column.kind === 'category' ? Array.from(column.codes) : [...column.values];
  const present = cells.filter((cell) => cell !== null && cell !== -1 && !Number.isNaN(cell));
  const unit = column.kind === 'numeric' ? (column.unit ?? null) : null;
  const counts = { missingCount: cells.length - present.length, distinctCount: new Set(present).size };
  return { name: column.name, kind: column.kind, unit, ...counts };
}

const sideOf = ({ rowCount, columns }: RecordTable): ComparedTable => ({
  rowCount,
  columns: columns.map(facts),
  read: (name) => columns.find((column) => column.name === name) as RecordColumn,
});

/** Codes in the order in which the levels come up, so that they differ between the two sides. */
function category(name: string, words: readonly string[]): RecordColumn {
  const levels = [...new Set(words)];
  return { name, kind: 'category', levels, codes: Int32Array.from(words, (word) => levels.indexOf(word)) };
}

const boats = (rows: readonly Row[]): ComparedTable =>
  sideOf({
    rowCount: rows.length,
    columns: [
      { name: 'id', kind: 'numeric', values: Float64Array.from(rows, (row) => row[0]) },
      category(
        'hull',
        rows.map((row) => row[1]),
      ),
      { name: 'length', kind: 'numeric', values: Float64Array.from(rows, (row) => row[2]) },
    ],
  });

function compared(from: ComparedTable, to: ComparedTable, key: string | null): TableComparison {
  const found = compareTables(from, to, key);
  if (!('rows' in found)) throw new Error('The key was refused.');
  return found;
}

const hulls = ['steel', 'oak', 'larch'] as const;
const someRows = fc
  .uniqueArray(fc.integer({ min: 1, max: 500 }), { minLength: 1, maxLength: 60 })
  .chain((ids) =>
    fc.tuple(...ids.map((id) => fc.tuple(fc.constant(id), fc.constantFrom(...hulls), fc.integer({ min: 1, max: 3 })))),
  );
/** What becomes of a row: it stays, goes, or gets another length. */
const fates = fc.array(fc.constantFrom('stays', 'goes', 'changes'), { minLength: 60, maxLength: 60 });
const newLengths = fc.array(fc.integer({ min: 1, max: 3 }), { maxLength: 10 });

function revised(rows: readonly Row[], fate: readonly string[], added: readonly number[]) {
  const kept = rows.flatMap(([id, hull, length], at): Row[] => {
    if (fate[at] === 'goes') return [];
    return [[id, hull, fate[at] === 'changes' ? length + 10 : length]];
  });
  const extra = added.map((length, at): Row => [1000 + at, 'oak', length]);
  const count = (wanted: string): number => rows.filter((_, at) => fate[at] === wanted).length;
  return { rows: [...kept, ...extra], goes: count('goes'), changes: count('changes'), stays: count('stays') };
}

describe('comparing two tables by a key', () => {
  it('counts exactly what was added, removed and changed, in whatever order the rows stand', () => {
    fc.assert(
      fc.property(someRows, fates, newLengths, fc.boolean(), (rows, fate, added, reversed) => {
        const after = revised(rows, fate, added);
        fc.pre(after.rows.length > 0);
        const to = boats(reversed ? after.rows.toReversed() : after.rows);
        const { rows: counts, columns } = compared(boats(rows), to, 'id');
        expect(counts).toEqual({
          added: added.length,
          removed: after.goes,
          changed: after.changes,
          unchanged: after.stays,
        });
        expect(columns.map(({ name, changedCount }) => [name, changedCount])).toEqual([
          ['id', 0],
          ['hull', 0],
          ['length', after.changes],
        ]);
      }),
    );
  });

  it('tells each change with its rows and cells', () => {
    const [from, to] = [
      boats([
        [1, 'oak', 8],
        [2, 'steel', 9],
        [3, 'oak', 10],
      ]),
      boats([
        [4, 'oak', 8],
        [3, 'larch', 11],
        [2, 'steel', 9],
      ]),
    ];
    expect(compared(from, to, 'id')).toMatchObject({
      key: 'id',
      keys: ['id', 'length'],
      changes: [
        {
          fromRow: 3,
          toRow: 2,
          cells: [
            { column: 'hull', from: 'oak', to: 'larch' },
            { column: 'length', from: 10, to: 11 },
          ],
        },
      ],
      added: [1],
      removed: [1],
      columns: [
        { name: 'id', state: 'same', changedCount: 0 },
        {
          name: 'hull',
          state: 'changed',
          shape: { levels: ['oak', 'steel', 'larch'], from: [2, 1, 0], to: [1, 1, 1] },
        },
        { name: 'length', state: 'changed' },
      ],
    });
  });

  it('is refused where the key repeats, is missing somewhere, or is not in both', () => {
    const rows: Row[] = [
      [1, 'oak', 8],
      [2, 'oak', NaN],
    ];
    for (const key of ['hull', 'length', 'beam'])
      expect(compareTables(boats(rows), boats(rows), key)).toEqual({ keys: ['id'] });
  });
});

describe('comparing two tables by order', () => {
  const addUp = ({ rows }: TableComparison, from: number, to: number): void => {
    expect(rows.unchanged + rows.changed + rows.added).toBe(to);
    expect(rows.unchanged + rows.changed + rows.removed).toBe(from);
  };

  it('gives counts that add up, whatever the two hold', () => {
    fc.assert(
      fc.property(someRows, someRows, (before, after) => {
        addUp(compared(boats(before), boats(after), ''), before.length, after.length);
      }),
    );
  });

  it('finds rows that were only added or only removed, with no key to go by', () => {
    fc.assert(
      fc.property(someRows, fates, (rows, fate) => {
        const left = rows.filter((_, at) => fate[at] !== 'goes');
        const gone = rows.length - left.length;
        fc.pre(left.length > 0);
        const removal = compared(boats(rows), boats(left), '');
        expect(removal.rows).toEqual({ added: 0, removed: gone, changed: 0, unchanged: left.length });
        const addition = compared(boats(left), boats(rows), '');
        expect(addition.rows).toEqual({ added: gone, removed: 0, changed: 0, unchanged: left.length });
      }),
    );
  });

  it('finds a row that changed between rows that did not', () => {
    const rows = Array.from({ length: 50 }, (_, at): Row => [at, 'oak', at % 3]);
    const after = rows.map((row): Row => (row[0] === 20 ? [20, 'oak', 99] : row)).filter((row) => row[0] !== 7);
    expect(compared(boats(rows), boats(after), '')).toMatchObject({
      key: null,
      rows: { added: 0, removed: 1, changed: 1, unchanged: 48 },
      changes: [{ fromRow: 21, toRow: 20, cells: [{ column: 'length', from: 2, to: 99 }] }],
      removed: [8],
    });
  });

  it('finds rows that changed beside rows that went, even when every row changed', () => {
    const rows = Array.from({ length: 50 }, (_, at): Row => [at, hulls[at % 3], at]);
    const after = rows.flatMap((row): Row[] => (row[0] % 10 === 4 ? [] : [[row[0], row[1], row[2] + 0.5]]));
    const found = compared(boats(rows), boats(after), '');
    expect(found.rows).toEqual({ added: 0, removed: 5, changed: 45, unchanged: 0 });
    expect(found.columns.map((column) => column.changedCount)).toEqual([0, 0, 45]);
    expect(found.removed).toEqual([5, 15, 25, 35, 45]);
  });

  it('puts rows side by side when all of them changed', () => {
    const rows = Array.from({ length: 30 }, (_, at): Row => [at, 'oak', 5]);
    const after = rows.map(([id, hull]): Row => [id, hull, 6]);
    const found = compared(boats(rows), boats(after), '');
    expect(found.rows).toEqual({ added: 0, removed: 0, changed: 30, unchanged: 0 });
    expect(found.columns.map((column) => column.changedCount)).toEqual([0, 0, 30]);
  });
});

describe('the key that is found', () => {
  const side = (columns: RecordColumn[]): ComparedTable => sideOf({ rowCount: 3, columns });
  const measure: RecordColumn = { name: 'length', kind: 'numeric', values: Float64Array.of(1.5, 2.25, 3) };
  const names: RecordColumn = { name: 'name', kind: 'text', values: ['Tern', 'Gull', 'Skua'] };

  it('is the earliest column that names rows, never a measure that happens not to repeat', () => {
    expect(compared(side([measure, names]), side([measure, names]), null).key).toBe('name');
    const found = compared(side([measure]), side([measure]), null);
    expect(found).toMatchObject({ key: null, keys: ['length'] });
  });

  it('is none that links less than half of the rows', () => {
    const others: RecordColumn = { name: 'name', kind: 'text', values: ['Auk', 'Knot', 'Skua'] };
    expect(compared(side([names]), side([others]), null)).toMatchObject({ key: null, keys: ['name'] });
  });
});

describe('a column whose kind changed', () => {
  it('is compared as it is written', () => {
    const before: RecordColumn = {
      name: 'depth',
      kind: 'category',
      levels: ['1.5', 'two'],
      codes: Int32Array.of(0, 1),
    };
    const after: RecordColumn = { name: 'depth', kind: 'numeric', values: Float64Array.of(1.5, NaN) };
    const side = (column: RecordColumn): ComparedTable => sideOf({ rowCount: 2, columns: [column] });
    expect(compared(side(before), side(after), '')).toMatchObject({
      rows: { changed: 1, unchanged: 1 },
      changes: [{ toRow: 2, cells: [{ from: 'two', to: null }] }],
      columns: [{ state: 'changed', changedCount: 1, shape: null }],
    });
  });
});
