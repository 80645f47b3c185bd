import { buffer } from 'node:stream/consumers';
import { deflateRawSync } from 'node:zlib';
import { strToU8, zipSync, type Zippable } from 'fflate';
import { TableReadings } from '../../../../../test/support/table-reading';
import { zipExcerpt } from './zip-excerpt';

const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const relationships = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const head = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>';

interface MadeSheet {
  readonly name: string;
  readonly state?: string;
  /** Rows as XML. */
  readonly rows: string;
}

const escaped = (text: string): string =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('"', '&quot;');
const words = (reference: string, text: string): string =>
  `<c r="${reference}" t="inlineStr"><is><t xml:space="preserve">${escaped(text)}</t></is></c>`;
const number = (reference: string, value: number | string, style = 0): string =>
  `<c r="${reference}" s="${style}"><v>${value}</v></c>`;
const row = (at: number, ...cells: string[]): string => `<row r="${at}">${cells.join('')}</row>`;

/** A workbook as ECMA-376 part 1 has it (sections 18.2, 18.3 and 18.8), with as little as a reader needs. */
function workbookParts(sheets: readonly MadeSheet[]): Zippable {
  const list = sheets.map(
    ({ name, state }, at) =>
      `<sheet name="${escaped(name)}" sheetId="${at + 1}"${state ? ` state="${state}"` : ''} r:id="rId${at + 1}"/>`,
  );
  const targets = sheets.map(
    (_, at) =>
      `<Relationship Id="rId${at + 1}" Type="${relationships}/worksheet" Target="worksheets/sheet${at + 1}.xml"/>`,
  );
  const styles = `<styleSheet xmlns="${main}"><numFmts count="1"><numFmt numFmtId="164" formatCode="yyyy\\-mm\\-dd\\ hh:mm"/></numFmts><cellXfs count="3"><xf numFmtId="0"/><xf numFmtId="14"/><xf numFmtId="164"/></cellXfs></styleSheet>`;
  const parts: Record<string, string> = {
    '[Content_Types].xml': `${head}<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"/>`,
    'xl/workbook.xml': `${head}<workbook xmlns="${main}" xmlns:r="${relationships}"><sheets>${list.join('')}</sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': `${head}<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">${targets.join('')}<Relationship Id="rId99" Type="${relationships}/styles" Target="/xl/styles.xml"/></Relationships>`,
    'xl/styles.xml': head + styles,
  };
  for (const [at, { rows }] of sheets.entries())
    parts[`xl/worksheets/sheet${at + 1}.xml`] =
      `${head}<worksheet xmlns="${main}"><sheetData>${rows}</sheetData></worksheet>`;
  return Object.fromEntries(Object.entries(parts).map(([name, text]) => [name, strToU8(text)]));
}

const workbookOf = (...sheets: MadeSheet[]): Uint8Array => zipSync(workbookParts(sheets));

const notes: MadeSheet = { name: 'Notes & more', rows: row(1, words('A1', 'Only a title')) };
const refits: MadeSheet = {
  name: 'Refits',
  rows: [
    row(1, words('B1', 'Marl Bay export')),
    row(
      3,
      words('B3', 'length (m)'),
      words('C3', 'hull'),
      words('E3', 'day'),
      words('F3', 'twice'),
      words('G3', 'winter'),
    ),
    row(
      4,
      number('B4', 12.345),
      words('C4', ' oak '),
      number('E4', 45292, 1),
      '<c r="F4"><f>B4*2</f><v>24.69</v></c>',
      '<c r="G4" t="b"><v>1</v></c>',
    ),
    row(
      5,
      number('B5', 9),
      words('C5', 'steel'),
      number('E5', 45292.75, 2),
      '<c r="F5" t="e"><f>1/0</f><v>#DIV/0!</v></c>',
      '<c r="G5" t="b"><v>0</v></c>',
    ),
    row(
      7,
      '<c r="B7" t="e"><v>#N/A</v></c>',
      words('C7', 'n/a'),
      number('E7', 45294, 1),
      '<c r="F7" t="str"><f>B7&amp;""</f><v>none</v></c>',
    ),
  ].join(''),
};

/** The workbook with a part in place of its own, packed already; its size is as told. */
async function packed(name: string, part: Buffer, unpackedBytes: number): Promise<Buffer> {
  const rest = Object.entries(workbookParts([refits])).filter(([other]) => other !== name);
  const entry = { crc: 0, encrypted: false, headerOffset: 0, packedBytes: 0, unpackedBytes: 0 };
  const stored = rest.map(([other, content]) => {
    const bytes = Buffer.from(content as Uint8Array);
    return { entry: { ...entry, name: other, method: 0 }, packed: bytes, unpackedBytes: bytes.length };
  });
  return buffer(zipExcerpt([...stored, { entry: { ...entry, name, method: 8 }, packed: part, unpackedBytes }]));
}

/** The first bytes of a compound file, and a directory entry with a stream's name ([MS-CFB], sections 2.2 and 2.6). */
function compoundFile(streamName: string): Buffer {
  const file = Buffer.alloc(512 * 4);
  Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]).copy(file);
  file.writeUInt16LE(0x3e, 24);
  file.writeUInt16LE(3, 26);
  file.writeUInt16LE(0xfffe, 28);
  file.writeUInt16LE(9, 30);
  file.write('Root Entry', 512 * 2, 'utf16le');
  file.write(streamName, 512 * 2 + 128, 'utf16le');
  return file;
}

describe('reading a workbook', () => {
  let tables: TableReadings;
  beforeAll(() => void (tables = new TableReadings()));
  afterAll(() => tables.close());

  it('takes the first sheet with a table: formulas as values, dates by format, errors as missing, titles passed over', async () => {
    const { columns, cells, kinds, format, sheet } = await tables.read(workbookOf(notes, refits));
    expect([sheet, format]).toEqual(['Refits', { encoding: '', delimiter: '', headerLine: 3 }]);
    expect(columns.map(({ name }) => name)).toEqual(['length (m)', 'hull', 'day', 'twice', 'winter']);
    expect(kinds).toEqual(['numeric', 'category', 'date', 'category', 'category']);
    expect(cells).toEqual([
      [12.345, 9, null],
      [' oak ', 'steel', null],
      ['2024-01-01', '2024-01-01T18:00:00Z', '2024-01-03'],
      ['24.69', null, 'none'],
      ['true', 'false', null],
    ]);
  });

  it('needs neither styles nor shared words', async () => {
    const parts = workbookParts([{ name: 'S', rows: row(1, words('A1', 'a')) + row(2, '<c r="A2"><v>7</v></c>') }]);
    delete parts['xl/styles.xml'];
    expect((await tables.read(zipSync(parts))).cells).toEqual([[7]]);
  });

  it('takes the sheet chosen, or says which ones there are', async () => {
    const yards = { name: 'Yards', rows: row(1, words('A1', 'yard')) + row(2, words('A2', 'North')) };
    const both = workbookOf(refits, yards);
    expect((await tables.read(both, { sheet: 'Yards' })).cells).toEqual([['North']]);
    await expect(tables.read(both, { sheet: 'Docks' })).rejects.toMatchObject({
      code: 'file-sheet',
      detail: expect.stringContaining('“Refits”, “Yards”'),
    });
  });

  it('takes a hidden sheet only when no other has a table', async () => {
    const hidden = { ...refits, state: 'hidden' };
    const seen = { name: 'Seen', rows: row(1, words('A1', 'x')) + row(2, number('A2', 1)) };
    expect((await tables.read(workbookOf(hidden, seen))).sheet).toBe('Seen');
    expect((await tables.read(workbookOf(hidden, notes))).sheet).toBe('Refits');
  });

  it('never takes a number of three decimals for grouped thousands, whatever mark is chosen', async () => {
    const rows =
      row(1, words('A1', 'a'), words('B1', 'b')) +
      row(2, number('A2', 1.234), words('B2', '3,5')) +
      row(3, number('A3', 5.678), number('B3', 4.25));
    const book = workbookOf({ name: 'S', rows });
    for (const decimal of ['.', ','] as const)
      expect((await tables.read(book, { decimal })).cells).toEqual([
        [1.234, 5.678],
        [3.5, 4.25],
      ]);
  });

  it('is proposed with its sheets and the choices found', async () => {
    const proposal = await tables.propose(workbookOf(notes, refits));
    expect(proposal).toMatchObject({
      fileKind: 'workbook',
      sheets: ['Notes & more', 'Refits'],
      encoding: '',
      choices: { sheet: 'Refits', headerLine: 3, decimal: '.' },
      rowsLookedAt: 3,
      complete: true,
    });
    expect(proposal.read[1].slice(0, 3)).toEqual([9, 'steel', '2024-01-01T18:00:00Z']);
  });

  it('needs no password, and says so of one that does', async () => {
    await expect(tables.read(compoundFile('EncryptedPackage'))).rejects.toMatchObject({
      code: 'file-protected',
      detail: expect.stringContaining('without the password'),
    });
    await expect(tables.read(compoundFile('Workbook'))).rejects.toMatchObject({
      code: 'file-not-table',
      detail: expect.stringContaining('old spreadsheet workbook'),
    });
  });

  it('says that it breaks off, or is damaged', async () => {
    const whole = workbookOf(refits);
    for (const length of [whole.length - 30, Math.floor(whole.length / 2), 200])
      await expect(tables.read(whole.subarray(0, length))).rejects.toMatchObject({
        code: 'file-not-table',
        detail: expect.stringContaining('breaks off'),
      });
    const parts = workbookParts([refits]);
    delete parts['xl/_rels/workbook.xml.rels'];
    await expect(tables.read(zipSync(parts))).rejects.toMatchObject({ code: 'file-not-table' });
    const broken = { ...workbookParts([refits]), 'xl/worksheets/sheet1.xml': strToU8('<worksheet><sheetData><row') };
    await expect(tables.read(zipSync(broken))).rejects.toMatchObject({ code: expect.stringMatching(/^file-/) });
  });

  it('is not any zip file, nor a workbook without a table', async () => {
    await expect(tables.read(zipSync({ 'a.txt': strToU8('a,b') }))).rejects.toMatchObject({
      code: 'file-not-table',
      detail: expect.stringContaining('a zip file'),
    });
    await expect(tables.read(workbookOf(notes))).rejects.toMatchObject({ code: 'file-empty' });
  });

  it('is read with a sign in its sheets’ names that otherwise ends an element', async () => {
    const parts = workbookParts([refits]);
    const list = Buffer.from(parts['xl/workbook.xml'] as Uint8Array).toString('utf8');
    parts['xl/workbook.xml'] = strToU8(list.replace('name="Refits"', 'name="a > b"'));
    expect((await tables.read(zipSync(parts))).sheet).toBe('a > b');
  });

  it.each([
    ['elements that never end', '<sheet '.repeat(600_000)],
    ['one attribute without end', `<sheet ${'a'.repeat(4_000_000)}>`],
    ['quotation marks without end', `<sheet ${'a="'.repeat(1_000_000)}`],
  ])('comes to an end with a list of sheets of %s', async (_what, list) => {
    const file = zipSync({ ...workbookParts([refits]), 'xl/workbook.xml': strToU8(list) });
    await expect(tables.read(file)).rejects.toMatchObject({ code: expect.stringMatching(/^file-/) });
  });

  it('is refused when its directory is longer than any workbook’s', async () => {
    const whole = Buffer.from(workbookOf(refits));
    const end = whole.length - 22;
    const padded = Buffer.concat([whole.subarray(0, end), Buffer.alloc(20_000_000), whole.subarray(end)]);
    padded.writeUInt32LE(20_000_000, padded.length - 22 + 12);
    await expect(tables.read(padded)).rejects.toMatchObject({ code: 'file-not-table' });
  });

  it('is refused when a sheet unpacks to far more than it may, whatever it says of its size', async () => {
    const sheet = deflateRawSync(Buffer.alloc(260_000_000), { level: 1 });
    const bomb = await packed('xl/worksheets/sheet1.xml', sheet, 260_000_000);
    const lying = await packed('xl/worksheets/sheet1.xml', sheet, 10);
    expect(bomb.length).toBeLessThan(4_000_000);
    for (const file of [bomb, lying]) await expect(tables.read(file)).rejects.toMatchObject({ code: 'file-too-large' });
  });
});
