import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { cellsToCodes, cellsToNumbers, cellsToTexts } from '../cell-blocks';
import { dateText } from './date-cell';
import { readTable } from './read-table';
import { SpillFile } from './spill-file';

type Cell = number | string | null;

describe('reading a table', () => {
  let folder: string;
  let files = 0;
  beforeAll(() => void (folder = mkdtempSync(join(tmpdir(), 'tarebeam-reading-'))));
  afterAll(() => rmSync(folder, { recursive: true }));

  async function read(content: string | Buffer) {
    const path = join(folder, `${++files}.csv`);
    writeFileSync(path, content);
    const spill = new SpillFile(`${path}.spill`, 'wx+');
    const reading = await readTable(path, spill);
    const cells = reading.columns.map((column): Cell[] => {
      const blocks = column.blocks.map((place) => spill.read(place));
      if (column.kind === 'text') return blocks.flatMap(cellsToTexts);
      if (column.kind === 'category')
        return blocks.flatMap((block) =>
          Array.from(cellsToCodes(block), (code) => (code < 0 ? null : column.levels[code].value)),
        );
      const values = blocks.flatMap((block) =>
        Array.from(cellsToNumbers(block), (value) => (Number.isNaN(value) ? null : value)),
      );
      return column.kind === 'date' ? values.map((value) => (value === null ? null : dateText(value))) : values;
    });
    spill.close();
    return { ...reading, kinds: reading.columns.map((column) => column.kind), cells };
  }

  it.each([
    [',', '.'],
    [';', ','],
    [';', '.'],
    ['\t', ','],
    ['|', '.'],
  ] as const)('finds the delimiter %j and the decimal mark %j', async (delimiter, mark) => {
    const number = (value: number): string => value.toFixed(2).replace('.', mark);
    const lines = Array.from({ length: 40 }, (_, row) =>
      [number(row * 1.37), row % 2 ? 'oak' : 'steel', String(row)].join(delimiter),
    );
    const table = await read(`length (m)${delimiter}hull${delimiter}count\r\n${lines.join('\r\n')}\r\n`);
    expect(table.format.delimiter).toBe(delimiter);
    expect(table.decimal).toBe(mark);
    expect(table.kinds).toEqual(['numeric', 'category', 'numeric']);
    expect(table.cells[0][7]).toBe(9.59);
  });

  it('takes a quoted decimal comma beside a comma delimiter', async () => {
    const table = await read('a,b\n"1,5",x\n"2,25",y\n');
    expect(table.cells[0]).toEqual([1.5, 2.25]);
    expect(table.decimal).toBe(',');
  });

  it('reads thousands by the mark that the other columns show', async () => {
    expect((await read('a;b\n1,5;1.234\n2,5;12.500\n')).cells[1]).toEqual([1234, 12500]);
    expect((await read('a;b\n1.5;1.234\n2.5;12.500\n')).cells[1]).toEqual([1.234, 12.5]);
    expect((await read('a,b\n1.5,"1,234"\n2.5,"12,500"\n')).cells[1]).toEqual([1234, 12500]);
  });

  it('keeps delimiters, line breaks and quotation marks inside quotes, and inch marks outside', async () => {
    const table = await read('a,b\n"oak, ""old""\nstock",12" pipe\nplain,x\n');
    expect(table.cells).toEqual([
      ['oak, "old"\nstock', 'plain'],
      ['12" pipe', 'x'],
    ]);
  });

  it('passes over a byte order mark and reads UTF-16', async () => {
    expect((await read('\ufefflänge;b\n1;2\n')).columns[0].name).toBe('länge');
    const utf16 = await read(Buffer.from('\ufefflänge;holz\n1;Föhre\n2;Eiche\n', 'utf16le'));
    expect(utf16.format.encoding).toBe('utf-16le');
    expect(utf16.cells).toEqual([
      [1, 2],
      ['Föhre', 'Eiche'],
    ]);
  });

  it('takes spaces after the delimiter for padding, when they stand everywhere', async () => {
    const table = await read('a, b, c\n1, "oak, old", 3\n4, steel, 6\n');
    expect(table.columns.map((column) => column.name)).toEqual(['a', 'b', 'c']);
    expect(table.cells[1]).toEqual(['oak, old', 'steel']);
  });

  it('passes over blank rows', async () => {
    expect((await read('\n\na,b\n1,2\n\n,\n3,4\n\n')).cells).toEqual([
      [1, 3],
      [2, 4],
    ]);
  });

  it('knows missing marks from answers', async () => {
    const table = await read('a,b\n1,none\nNA,N/A\n-,oak\n,null\n#DIV/0!,\n2,oak\n');
    expect(table.cells).toEqual([
      [1, null, null, null, null, 2],
      ['none', null, 'oak', null, null, 'oak'],
    ]);
  });

  it('takes day and month only in an order that the whole column confirms', async () => {
    expect((await read('d,x\n01/02/2024,1\n25/02/2024,2\n')).cells[0]).toEqual(['2024-02-01', '2024-02-25']);
    expect((await read('d,x\n01/02/2024,1\n02/25/2024,2\n')).cells[0]).toEqual(['2024-01-02', '2024-02-25']);
    expect((await read('d,x\n01/02/2024,1\n05/02/2024,2\n')).kinds[0]).toBe('category');
    expect((await read('d,x\n25/02/2024,1\n02/25/2024,2\n')).kinds[0]).toBe('category');
  });

  it('leaves codes with leading zeros as words, and mostly different words as text', async () => {
    const lines = Array.from({ length: 120 }, (_, row) => `${String(row % 7).padStart(3, '0')},case number ${row}`);
    expect((await read(`code,case\n${lines.join('\n')}\n`)).kinds).toEqual(['category', 'text']);
  });

  describe('when later rows prove the first guess wrong', () => {
    const rows = 12_000;
    const table = (cell: (row: number) => string): string =>
      `x,y\n${Array.from({ length: rows }, (_, row) => `${cell(row)};${row}`.replace(';', ',')).join('\n')}\n`;

    it('turns numbers into words with nothing lost', async () => {
      const { kinds, cells } = await read(table((row) => (row === rows - 1 ? 'unknown' : String(row % 40) + '.50')));
      expect(kinds).toEqual(['category', 'numeric']);
      expect(cells[0].slice(0, 2)).toEqual(['0.50', '1.50']);
      expect(cells[0][rows - 1]).toBe('unknown');
      expect(cells[1][rows - 1]).toBe(rows - 1);
    });

    it('puts month before day', async () => {
      const { kinds, cells } = await read(table((row) => (row === rows - 1 ? '12/31/2023' : '03/04/2023')));
      expect(kinds[0]).toBe('date');
      expect([cells[0][0], cells[0][rows - 1]]).toEqual(['2023-03-04', '2023-12-31']);
    });

    it('finds what a column holds that begins with nothing', async () => {
      const { kinds, cells } = await read(table((row) => (row < 11_000 ? '' : '2.5')));
      expect(kinds[0]).toBe('numeric');
      expect([cells[0][10_999], cells[0][11_000]]).toEqual([null, 2.5]);
    });

    it('goes on as text when a column has too many different words', async () => {
      const { kinds, cells } = await read(table((row) => `word ${row}`));
      expect(kinds[0]).toBe('text');
      expect([cells[0][0], cells[0][rows - 1]]).toEqual(['word 0', `word ${rows - 1}`]);
    });
  });

  it('crosses blocks without losing or repeating a row', async () => {
    const rows = 70_000;
    const { blockRowCounts, cells } = await read(
      `a,b\n${Array.from({ length: rows }, (_, row) => `${row},k${row % 3}`).join('\n')}\n`,
    );
    expect(blockRowCounts).toEqual([65_536, rows - 65_536]);
    expect(cells[0]).toEqual(Array.from({ length: rows }, (_, row) => row));
    expect(cells[1][65_536]).toBe(`k${65_536 % 3}`);
  });

  it('finds an invalid byte behind the first chunk, where characters straddle the chunks', async () => {
    const good = `a,b\n${'é,ü€😀\n'.repeat(60_000)}`;
    const bad = Buffer.concat([Buffer.from(good), Buffer.from([0x31, 0x2c, 0xe9, 0x0a])]);
    expect((await read(good)).rowCount).toBe(60_000);
    await expect(read(bad)).rejects.toMatchObject({ code: 'file-encoding', line: 60_002 });
  });

  it('unpacks gzip, and says when the packed file breaks off', async () => {
    const lines = Array.from({ length: 30_000 }, (_, row) => `${row},${(row * 7919) % 10_007}`);
    const packed = gzipSync(`a,b\n${lines.join('\n')}\n`);
    expect((await read(packed)).rowCount).toBe(30_000);
    await expect(read(packed.subarray(0, packed.length - 500))).rejects.toMatchObject({
      code: 'file-not-table',
      detail: expect.stringContaining('breaks off'),
    });
    await expect(read(packed.subarray(0, 20))).rejects.toMatchObject({ code: 'file-not-table' });
    await expect(read(gzipSync(Buffer.from([0x50, 0x4b, 3, 4, 20, 0])))).rejects.toMatchObject({
      code: 'file-not-table',
    });
  });

  it('says on which line a row is too short or too long', async () => {
    await expect(read(`a,b\n${'1,2\n'.repeat(9000)}1,2,3\n`)).rejects.toMatchObject({
      code: 'file-ragged',
      line: 9002,
      detail: expect.stringContaining('3 cells where the header has 2'),
    });
  });
});
