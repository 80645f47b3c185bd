import { TableReadings } from '../../../../test/support/table-reading';
import type { ReadingProgress } from './reading-choices';

describe('reading a table as was chosen', () => {
  let tables: TableReadings;
  beforeAll(() => void (tables = new TableReadings()));
  afterAll(() => tables.close());

  it('takes a mark by its text in every column, and by its number in numeric ones', async () => {
    const { cells, missingMarks } = await tables.read('a,b\n1,999\n999,oak\n999.0,Unknown\n2,x\n', {
      missingMarks: ['999', 'unknown'],
    });
    expect(cells).toEqual([
      [1, null, null, 2],
      [null, 'oak', null, 'x'],
    ]);
    expect(missingMarks).toEqual(['999', 'unknown']);
  });

  it('takes a column’s own mark in that column only', async () => {
    const columns = [{ name: 'a', missingMarks: ['-1'] }];
    expect((await tables.read('a,b\n-1,-1\n2,3\n', { columns })).cells).toEqual([
      [null, 2],
      [-1, 3],
    ]);
  });

  it('makes numbers of words with a mark once the mark is known', async () => {
    const text = 'a,b\n1,1\nlost,2\n3,3\n';
    expect((await tables.read(text)).kinds[0]).toBe('category');
    expect((await tables.read(text, { missingMarks: ['LOST'] })).cells[0]).toEqual([1, null, 3]);
  });

  it('never writes a column that is set aside, and numbers the others anew', async () => {
    const { columns, cells, setAside } = await tables.read('a,b,c\n1,secret,x\n2,hidden,y\n', {
      columns: [{ name: 'b', setAside: true }],
    });
    expect(columns.map(({ name, position }) => [name, position])).toEqual([
      ['a', 0],
      ['c', 1],
    ]);
    expect(cells.flat()).toEqual([1, 2, 'x', 'y']);
    expect(setAside).toEqual(['b']);
  });

  it('keeps what fits a forced kind and counts what does not', async () => {
    const { cells, unreadable } = await tables.read('n,d\n1,2024-01-02\nabout 3,03/02/2024\n007,soon\nNA,\n', {
      columns: [
        { name: 'n', kind: 'numeric' },
        { name: 'd', kind: 'date', dateOrder: 'month-first' },
      ],
    });
    expect(cells).toEqual([
      [1, null, 7, null],
      ['2024-01-02', '2024-03-02', null, null],
    ]);
    expect(unreadable).toEqual([
      { column: 'n', count: 1 },
      { column: 'd', count: 1 },
    ]);
  });

  it('keeps numbers as words when these are chosen', async () => {
    const columns = [
      { name: 'a', kind: 'category' as const },
      { name: 'b', kind: 'text' as const },
    ];
    const { kinds, cells } = await tables.read('a,b\n1.50,2\n2.50,2\n', { columns });
    expect(kinds).toEqual(['category', 'text']);
    expect(cells).toEqual([
      ['1.50', '2.50'],
      ['2', '2'],
    ]);
  });

  it('takes dates in the order chosen where they could stand in either', async () => {
    const text = 'd,x\n01/02/2024,1\n05/03/2024,2\n';
    const read = async (dateOrder: 'day-first' | 'month-first') =>
      (await tables.read(text, { columns: [{ name: 'd', dateOrder }] })).cells[0];
    expect(await read('day-first')).toEqual(['2024-02-01', '2024-03-05']);
    expect(await read('month-first')).toEqual(['2024-01-02', '2024-05-03']);
  });

  it('reads a forced date month first when a late row shows it', async () => {
    const rows = Array.from({ length: 6000 }, (_, row) => (row === 5999 ? '12/31/2023' : '01/02/2023'));
    const { cells, unreadable } = await tables.read(`d,x\n${rows.map((day) => `${day},1`).join('\n')}\n`, {
      columns: [{ name: 'd', kind: 'date' }],
    });
    expect([cells[0][0], cells[0][5999]]).toEqual(['2023-01-02', '2023-12-31']);
    expect(unreadable).toEqual([]);
  });

  it('takes the decimal mark chosen where the cells leave it open', async () => {
    const text = 'a;b\n1.234;x\n5.678;y\n';
    expect((await tables.read(text, { decimal: '.' })).cells[0]).toEqual([1.234, 5.678]);
    expect((await tables.read(text, { decimal: ',' })).cells[0]).toEqual([1234, 5678]);
  });

  it('takes the delimiter chosen', async () => {
    expect((await tables.read('a,b|c\n1,2|3\n', { delimiter: '|' })).columns.map(({ name }) => name)).toEqual([
      'a,b',
      'c',
    ]);
  });

  it('passes over titles above the names, and takes the header line chosen', async () => {
    const titled = 'Yard export\nmade today;;\n\na;b;c\n1;2;3\n4;5;6\n';
    const found = await tables.read(titled);
    expect([found.format.headerLine, found.cells]).toEqual([
      4,
      [
        [1, 4],
        [2, 5],
        [3, 6],
      ],
    ]);
    const chosen = await tables.read('old a,old b\na,b\n1,2\n', { headerLine: 2 });
    expect(chosen.columns.map(({ name }) => name)).toEqual(['a', 'b']);
  });

  it('counts lines from the top of the file when titles stand above the names', async () => {
    await expect(tables.read('Yard export\n\na,b,c\n1,2,3\n4,5,6\n7,8\n')).rejects.toMatchObject({
      code: 'file-ragged',
      line: 6,
    });
  });

  describe('units in cells', () => {
    it('are the column’s unit when they are all the same', async () => {
      const { columns, cells, kinds } = await tables.read('a,b,c\n12 m,"12,5%",12 A\n7.5m,3%,7 A\n');
      expect(kinds).toEqual(['numeric', 'numeric', 'category']);
      expect(columns.map(({ unit }) => unit)).toEqual(['m', '%', null]);
      expect(cells.slice(0, 2)).toEqual([
        [12, 7.5],
        [12.5, 3],
      ]);
    });

    it('are converted to the most frequent one, plain numbers being in it already', async () => {
      const { columns, cells } = await tables.read('a,b\n12 m,1\n57 cm,1\n10,1\n40 ft,1\n3 m,1\n');
      expect(columns[0].unit).toBe('m');
      expect(cells[0]).toEqual([12, 0.57, 10, 12.192, 3]);
    });

    it('are converted to the header’s, or to the one chosen', async () => {
      expect((await tables.read('a (mm),b\n12 m,1\n57 cm,1\n3,1\n')).cells[0]).toEqual([12_000, 570, 3]);
      const chosen = await tables.read('a (m),b\n10 ft,1\n3.048 m,1\n', { columns: [{ name: 'a (m)', unit: 'ft' }] });
      expect([chosen.columns[0].unit, chosen.cells[0]]).toEqual(['ft', [10, 10]]);
    });

    it('that cannot be converted leave words, or cells that do not fit a forced number', async () => {
      const text = 'a,b\n12 m,1\n3 kg,1\n4 m,1\n';
      expect((await tables.read(text)).kinds[0]).toBe('category');
      const forced = await tables.read(text, { columns: [{ name: 'a', kind: 'numeric' }] });
      expect(forced.cells[0]).toEqual([12, null, 4]);
      expect(forced.unreadable).toEqual([{ column: 'a', count: 1 }]);
    });

    it('that turn up late are read on a second pass, and so is another one that becomes the most frequent', async () => {
      const rows = Array.from({ length: 14_000 }, (_, row) => (row < 5500 ? '1 m' : '1 ft'));
      const late = await tables.read(`a,b\n${rows.map((cell) => `${cell},2`).join('\n')}\n`);
      expect(late.columns[0].unit).toBe('ft');
      expect(late.cells[0][0]).toBeCloseTo(1 / 0.3048, 12);
      expect(late.cells[0][13_999]).toBe(1);
      const plain = Array.from({ length: 6000 }, (_, row) => (row === 5999 ? '250 cm' : '2'));
      const found = await tables.read(`a (m),b\n${plain.map((cell) => `${cell},2`).join('\n')}\n`);
      expect([found.cells[0][0], found.cells[0][5999]]).toEqual([2, 2.5]);
    });

    it('are relabelled but not lost when no unit is chosen', async () => {
      const none = await tables.read('a,b\n12 m,1\n3 m,1\n', { columns: [{ name: 'a', unit: null }] });
      expect([none.columns[0].unit, none.cells[0]]).toEqual([null, [12, 3]]);
    });
  });

  it('holds to the kinds and units of the revision that the file is appended to', async () => {
    const base = [
      { name: 'code', kind: 'category' as const, unit: null },
      { name: 'length', kind: 'numeric' as const, unit: 'm' },
    ];
    const { columns, cells, setAside } = await tables.read('code,new,length\n1,x,10 ft\n2,y,3\n', {}, { base });
    expect(columns.map(({ kind, unit }) => [kind, unit])).toEqual([
      ['category', null],
      ['numeric', 'm'],
    ]);
    expect(cells).toEqual([
      ['1', '2'],
      [3.048, 3],
    ]);
    expect(setAside).toEqual(['new']);
  });

  it.each([
    [{ columns: [{ name: 'hull' }] }, 'choices-invalid', 'no column “hull”. Its columns are “a”, “b”'],
    [{ headerLine: 40 }, 'choices-invalid', 'ends before line 40'],
    [{ columns: ['a', 'b'].map((name) => ({ name, setAside: true })) }, 'choices-invalid', 'Every column is set aside'],
    [{ sheet: 'Yard' }, 'file-sheet', 'no sheets'],
  ])('refuses choices that do not fit the file: %j', async (choices, code, detail) => {
    await expect(tables.read('a,b\n1,2\n', choices)).rejects.toMatchObject({
      code,
      detail: expect.stringContaining(detail),
    });
  });

  it('tells how far it has come, a second pass included', async () => {
    const told: ReadingProgress[] = [];
    const text = `a,b\n${'1,2\n'.repeat(200_000)}x,3\n`;
    await tables.read(text, {}, { onProgress: (progress) => told.push(progress) });
    const bytes = told.filter(({ stage }) => stage === 'reading').map(({ done }) => done);
    expect(bytes.every((done, at) => at === 0 || done >= bytes[at - 1])).toBe(true);
    expect(told.filter(({ stage }) => stage === 'reading').at(-1)).toMatchObject({
      done: 2 * text.length,
      total: 2 * text.length,
    });
    expect(told.at(-1)).toEqual({ stage: 'measuring', done: 2, total: 2 });
  });
});
