import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { RecordColumn } from '../../regression/records';
import { finishTable } from '../mending/finish-table';
import { maximumLevelLength, maximumLevels } from '../reading/limits';
import { SpillFile } from '../reading/spill-file';
import { appendColumn } from './append-column';
import { appendTable, readSpilledColumn } from './append-table';

const category = (codes: readonly number[], levels: readonly string[]): RecordColumn => ({
  ...{ name: 'hull', kind: 'category', codes: Int32Array.from(codes), levels },
});
const text = (...values: (string | null)[]): RecordColumn => ({ name: 'hull', kind: 'text', values });
const numeric = (name: string, values: readonly number[], unit?: string): RecordColumn => ({
  ...{ name, kind: 'numeric', values: Float64Array.from(values), ...(unit !== undefined && { unit }) },
});

describe('appending to a column', () => {
  it('keeps the codes of the base’s levels and gives new ones the next codes in the order in which they come', () => {
    const whole = appendColumn(
      category([1, 0, -1], ['oak', 'steel']),
      category([2, 0, 1, -1], ['larch', 'oak', 'ash']),
    );
    expect(whole).toEqual(category([1, 0, -1, 2, 3, 0, -1], ['oak', 'steel', 'ash', 'larch']));
  });

  it('takes words that were read as text into a category', () => {
    expect(appendColumn(category([0], ['oak']), text('ash', null, 'oak'))).toEqual(
      category([0, 1, -1, 0], ['oak', 'ash']),
    );
  });

  it('leaves text text', () => {
    expect(appendColumn(text('a', null), category([1, -1, 0], ['x', 'y']))).toEqual(text('a', null, 'y', null, 'x'));
  });

  it('makes text of a category that gets more levels than a category may have, or a longer one', () => {
    const levels = Array.from({ length: maximumLevels }, (_, code) => `level ${code}`);
    const full = category([0, -1], levels);
    expect(appendColumn(full, category([0], ['level 1']))).toMatchObject({ kind: 'category' });
    expect(appendColumn(full, category([0], ['one more']))).toEqual(text('level 0', null, 'one more'));
    const long = 'x'.repeat(maximumLevelLength + 1);
    expect(appendColumn(category([0], ['oak']), text(long))).toEqual(text('oak', long));
  });

  it('keeps the base’s unit', () => {
    expect(appendColumn(numeric('length', [1, NaN], 'm'), numeric('length', [3]))).toEqual(
      numeric('length', [1, NaN, 3], 'm'),
    );
  });

  it('takes a column without any reading for whatever kind is wanted', () => {
    expect(appendColumn(numeric('hull', [1]), text(null, null))).toEqual(numeric('hull', [1, NaN, NaN]));
    expect(appendColumn(category([0], ['oak']), numeric('hull', [NaN]))).toEqual(category([0, -1], ['oak']));
  });

  it('refuses kinds that do not go together', () => {
    expect(() => appendColumn(numeric('hull', [1]), text('oak'))).toThrow('read as text');
    expect(() => appendColumn(text('oak'), numeric('hull', [1]))).toThrow('read as numeric');
  });
});

describe('appending to a table', () => {
  let folder: string;
  let spills: { added: SpillFile; all: SpillFile };

  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'tarebeam-append-'));
    spills = { added: new SpillFile(join(folder, 'added'), 'wx+'), all: new SpillFile(join(folder, 'all'), 'wx+') };
  });

  afterEach(() => {
    spills.added.close();
    spills.all.close();
    rmSync(folder, { recursive: true });
  });

  const columnsOf = (from: number, to: number): RecordColumn[] => {
    const rows = Array.from({ length: to - from }, (_, index) => from + index);
    return [
      numeric(
        'length',
        rows.map((row) => Math.sin(row) * 9),
      ),
      {
        name: 'hull',
        kind: 'category',
        codes: Int32Array.from(rows, (row) => (row % 4) - 1),
        levels: ['oak', 'ash', 'elm'],
      },
      { name: 'day', kind: 'date', values: Float64Array.from(rows, (row) => (row % 9 === 0 ? NaN : 20_000 + row)) },
      { name: 'remark', kind: 'text', values: rows.map((row) => (row % 5 === 0 ? null : `remark ${row}`)) },
    ];
  };

  it('gives the cells and the figures of the whole, in the base’s order', () => {
    const [before, rowCount] = [70_000, 150_000];
    const base = columnsOf(0, before);
    const added = finishTable(
      { rowCount: rowCount - before, columns: columnsOf(before, rowCount).reverse() },
      spills.added,
    );
    const steps: number[] = [];
    const readColumn = (name: string): RecordColumn => base.find((column) => column.name === name) as RecordColumn;
    const columnNames = base.map((column) => column.name);
    const whole = appendTable({ rowCount: before, columnNames, readColumn }, added, spills, (done) => steps.push(done));

    const once = new SpillFile(join(folder, 'once'), 'wx+');
    const columns = columnsOf(0, rowCount);
    const expected = finishTable({ rowCount, columns }, once);
    once.close();
    expect(whole).toEqual(expected);
    expect(whole.columns.map((column) => readSpilledColumn(column, rowCount, spills.all))).toEqual(columns);
    expect(steps).toEqual([1, 2, 3, 4]);
  });

  it('refuses rows that lack a column of the base', () => {
    const added = finishTable({ rowCount: 1, columns: [numeric('length', [1])] }, spills.added);
    const base = { rowCount: 1, columnNames: ['length', 'beam'], readColumn: (name: string) => numeric(name, [1]) };
    expect(() => appendTable(base, added, spills)).toThrow('lack a column');
  });
});
