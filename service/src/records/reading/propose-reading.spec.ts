import { TableReadings } from '../../../../test/support/table-reading';

describe('proposing how a file would be read', () => {
  let tables: TableReadings;
  beforeAll(() => void (tables = new TableReadings()));
  afterAll(() => tables.close());

  const doubtsAbout = async (cells: readonly string[], choices = {}): Promise<readonly string[]> =>
    (await tables.propose(`x;y\n${cells.map((cell) => `${cell};w`).join('\n')}\n`, choices)).columns[0].doubts;

  it('names every choice as it stands, and keeps those of the call', async () => {
    const columns = [{ name: 'a', missingMarks: ['x'] }];
    const { choices, fileKind, encoding } = await tables.propose('Title\n\na;b\n1,5;2\nx;3\n4,5;4\n', { columns });
    expect(choices).toEqual({ delimiter: ';', decimal: ',', headerLine: 3, missingMarks: [], columns });
    expect([fileKind, encoding]).toEqual(['text', 'utf-8']);
  });

  it('shows the first 200 rows as written and as read, and counts over the rows it looked at', async () => {
    const lines = Array.from({ length: 7000 }, (_, row) => (row % 10 === 0 ? 'NA' : `${row}.5`));
    const proposal = await tables.propose(`a,b\n${lines.map((cell) => `${cell},w`).join('\n')}\n`);
    expect([proposal.rowsLookedAt, proposal.complete]).toEqual([5000, false]);
    expect([proposal.written.length, proposal.read.length]).toEqual([200, 200]);
    expect([proposal.written[10], proposal.read[10]]).toEqual([
      ['NA', 'w'],
      [null, 'w'],
    ]);
    expect(proposal.columns[0]).toMatchObject({ kind: 'numeric', missingCount: 500, unreadableCount: 0, doubts: [] });
  });

  it('tells missing cells from those that do not fit, with their rows', async () => {
    const { columns, read } = await tables.propose('a,b\n1,x\nNA,x\nabout 4,x\n5,x\n', {
      columns: [{ name: 'a', kind: 'numeric' }],
    });
    expect(columns[0]).toMatchObject({ missingCount: 1, unreadableCount: 1, unreadableRows: [3] });
    expect(read.map(([cell]) => cell)).toEqual([1, null, null, 5]);
    expect(columns[0].doubts).toEqual(['1 cell cannot be read as numbers and would be missing.']);
  });

  it('shows a column that is set aside as written only', async () => {
    const { columns, written, read } = await tables.propose('a,b\n1,secret\n', {
      columns: [{ name: 'b', setAside: true }],
    });
    expect([columns[1].setAside, written[0], read[0]]).toEqual([true, ['1', 'secret'], [1, null]]);
  });

  it('lists the units in the cells with their factors', async () => {
    const { columns } = await tables.propose('a,b\n12 m,1\n3 m,1\n40 ft,1\n7,1\n');
    expect(columns[0]).toMatchObject({
      kind: 'numeric',
      unit: 'm',
      unitsInCells: [
        { unit: 'm', count: 2, factor: 1 },
        { unit: 'ft', count: 1, factor: 0.3048 },
      ],
      doubts: ['Units differ (m in 2 cells, ft in 1 cell); readings become m.', '1 cell without a unit counts as m.'],
    });
  });

  it('gives no factor to units that cannot be converted', async () => {
    const { columns } = await tables.propose('a,b\n12 m,1\n3 m,1\n40 kg,1\n');
    expect(columns[0].kind).toBe('category');
    expect(columns[0].unitsInCells).toEqual([
      { unit: 'm', count: 2, factor: 1 },
      { unit: 'kg', count: 1, factor: null },
    ]);
    expect(columns[0].doubts[0]).toContain('cannot be brought to one');
  });

  it('suspects numbers that come back far from the rest and never takes them for marks by itself', async () => {
    const proposal = await tables.propose(
      `a,b\n${[9, 10, 11, 12, 999, 999, 999].map((cell) => `${cell},w`).join('\n')}\n`,
    );
    expect(proposal.columns[0].suspectMarks).toEqual([{ mark: '999', count: 3 }]);
    expect(proposal.read[4][0]).toBe(999);
    const marked = await tables.propose('a,b\n9,w\n999,w\n999,w\n999,w\n', { missingMarks: ['999'] });
    expect(marked.columns[0]).toMatchObject({ suspectMarks: [], missingCount: 3, missingMarks: ['999'] });
  });

  it('doubts an order of day and month that no date confirms, until it is chosen', async () => {
    const days = ['01/02/2024', '03/04/2024'];
    expect(await doubtsAbout(days)).toEqual([expect.stringContaining('so they stay words')]);
    expect(await doubtsAbout(days, { columns: [{ name: 'x', kind: 'date' }] })).toEqual([
      expect.stringContaining('the day is taken to come first'),
    ]);
    expect(await doubtsAbout(days, { columns: [{ name: 'x', dateOrder: 'month-first' }] })).toEqual([]);
    expect(await doubtsAbout(['25/02/2024', '02/25/2024'])).toEqual([expect.stringContaining('others only')]);
  });

  it('doubts a decimal mark that nothing confirms, until it is chosen', async () => {
    expect(await doubtsAbout(['1.234', '5.678'])).toEqual([
      expect.stringContaining('“1.234” could have a decimal mark'),
    ]);
    expect(await doubtsAbout(['1.234', '5.678'], { decimal: '.' })).toEqual([]);
    expect(await doubtsAbout(['1.234', '5.67'])).toEqual([]);
  });

  it('says when zeros in front make words of numbers, and when few words do', async () => {
    expect(await doubtsAbout(['007', '012'])).toEqual([expect.stringContaining('begin with zeros')]);
    expect(await doubtsAbout(['1', '2', '3', 'lost'])).toEqual([
      expect.stringContaining('1 of 4 cells is not a number, such as “lost”'),
    ]);
    expect(await doubtsAbout(['oak', 'steel', 'larch'])).toEqual([]);
  });

  it('says that numbers are not converted to a unit that is chosen against the header', async () => {
    const choose = async (unit: string) =>
      (await tables.propose('a (m),b\n1,2\n', { columns: [{ name: 'a (m)', unit }] })).columns[0].doubts;
    expect(await choose('ft')).toEqual([expect.stringContaining('are not converted')]);
    expect(await choose('metres')).toEqual([]);
  });

  it('tells how the columns stand to those of the revision that the file is appended to', async () => {
    const base = [
      { name: 'length', kind: 'numeric' as const, unit: 'm' },
      { name: 'code', kind: 'category' as const, unit: null },
      { name: 'beam', kind: 'numeric' as const, unit: 'm' },
    ];
    const { columns, appending } = await tables.propose('length,code,new\n10 ft,1,x\n', {}, base);
    expect(columns.map(({ kind, unit, setAside }) => [kind, unit, setAside])).toEqual([
      ['numeric', 'm', false],
      ['category', null, false],
      ['category', null, true],
    ]);
    expect(appending).toEqual({ lacking: ['beam'], additional: ['new'], differing: ['length', 'code'] });
  });

  it('shows a file that has none of the revision’s columns, which reading it refuses', async () => {
    const base = [{ name: 'beam', kind: 'numeric' as const, unit: 'm' }];
    expect((await tables.propose('a,b\n1,2\n', {}, base)).appending?.lacking).toEqual(['beam']);
    await expect(tables.read('a,b\n1,2\n', {}, { base })).rejects.toMatchObject({ code: 'choices-invalid' });
  });

  describe('says what is wrong with', () => {
    const wide = Array.from({ length: 10_000 }, (_, column) => `c${column}`).join(',');
    it.each([
      ['an empty file', '', 'file-empty'],
      ['a header without rows', 'a,b\n', 'file-empty'],
      ['10,000 columns', `${wide}\n${wide}\n`, 'file-header'],
      ['a NUL', 'a,b\n1,\0\n', 'file-not-table'],
      ['bytes that are not UTF-8', Buffer.from('a,b\n1,\xe9\n', 'latin1'), 'file-encoding'],
      ['rows of other widths', 'a,b\n1,2\n1,2,3\n', 'file-ragged'],
      ['a quotation mark left open', `a,b\n1,"2\n${'3,4\n'.repeat(50)}`, 'file-ragged'],
    ])('%s', async (_, content, code) => {
      await expect(tables.propose(content)).rejects.toMatchObject({ code });
    });
  });
});
