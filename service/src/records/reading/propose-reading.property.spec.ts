import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { TableReadings, type Cell } from '../../../../test/support/table-reading';
import { isMissing } from './missing-marks';
import type { ColumnChoice, ReadingChoices } from './reading-choices';

/** How a table is written down. */
interface Writing {
  readonly delimiter: ',' | ';' | '\t' | '|';
  readonly decimal: '.' | ',';
  readonly thousands: '' | '.' | ',' | ' ' | '’';
  readonly unit: '' | ' m' | 'kg' | ' %';
  readonly missing: '' | 'NA' | '-' | 'n/a';
  readonly quoteAll: boolean;
  readonly lineEnd: '\n' | '\r\n';
  readonly titles: readonly string[];
  readonly packing: 'plain' | 'mark' | 'utf-16le' | 'gzip';
}

const writings: fc.Arbitrary<Writing> = fc
  .record<Writing>({
    delimiter: fc.constantFrom(',', ';', '\t', '|'),
    decimal: fc.constantFrom('.', ','),
    thousands: fc.constantFrom('', '.', ',', ' ', '’'),
    unit: fc.constantFrom('', ' m', 'kg', ' %'),
    missing: fc.constantFrom('', 'NA', '-', 'n/a'),
    quoteAll: fc.boolean(),
    lineEnd: fc.constantFrom('\n', '\r\n'),
    titles: fc.constantFrom([], ['Yard export'], ['Yard export', '', 'made 2026']),
    packing: fc.constantFrom('plain', 'mark', 'utf-16le', 'gzip'),
  })
  .filter(({ decimal, thousands }) => decimal !== thousands);

function packed(text: string, packing: Writing['packing']): Uint8Array {
  if (packing === 'utf-16le') return Buffer.from(`\ufeff${text}`, 'utf16le');
  if (packing === 'gzip') return gzipSync(text);
  return Buffer.from(packing === 'mark' ? `\ufeff${text}` : text);
}

const needsQuotes = (cell: string, delimiter: string): boolean => cell.includes(delimiter) || /["\r\n]/.test(cell);

function written(rows: readonly (readonly string[])[], writing: Writing): Uint8Array {
  const { delimiter, quoteAll, lineEnd, titles, packing } = writing;
  const cell = (text: string): string =>
    quoteAll || needsQuotes(text, delimiter) ? `"${text.replaceAll('"', '""')}"` : text;
  const lines = rows.map((row) => row.map(cell).join(delimiter));
  return packed([...titles, ...lines, ''].join(lineEnd), packing);
}

/** Two decimals, so that no number could be read in two ways. */
function numberText(hundredths: number, { decimal, thousands, unit }: Writing): string {
  const [whole, decimals] = Math.abs(hundredths / 100)
    .toFixed(2)
    .split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, thousands);
  return `${hundredths < 0 ? '-' : ''}${grouped}${decimal}${decimals}${unit}`;
}

const cellsOf = <Value>(value: fc.Arbitrary<Value>): fc.Arbitrary<(Value | null)[]> =>
  fc
    .array(fc.option(value, { freq: 8 }), { minLength: 3, maxLength: 30 })
    .filter((cells) => cells.some((cell) => cell !== null));

const hundredths = fc.integer({ min: -99_999_999, max: 99_999_999 });

/** Words that are neither a number, a date, a number with a unit, nor a mark for "no reading". */
const plainWords = fc
  .string({ unit: 'grapheme', minLength: 1, maxLength: 20 })
  .map((text) => `w${text.replaceAll('\0', '')}`)
  .filter((text) => !isMissing(text));

const days = fc.integer({ min: Date.UTC(1950, 0, 1) / 864e5, max: Date.UTC(2060, 0, 1) / 864e5 });
const isoOf = (day: number): string => new Date(day * 864e5).toISOString().slice(0, 10);
const dateForms = {
  iso: (iso: string) => iso,
  slashes: (iso: string) => iso.replaceAll('-', '/'),
  points: (iso: string) => iso.split('-').reverse().join('.'),
  'day-first': (iso: string) => iso.split('-').reverse().join('/'),
  'month-first': (iso: string) => `${iso.slice(5, 7)}/${iso.slice(8)}/${iso.slice(0, 4)}`,
} as const;

const header = ['first', 'second', 'third'];

describe('any table', () => {
  let tables: TableReadings;
  beforeAll(() => void (tables = new TableReadings()));
  afterAll(() => tables.close());

  /** Proposes, then reads with the choices proposed: both must come to the same, which is answered by column. */
  async function proposedAndRead(content: Uint8Array, choices: ReadingChoices = {}) {
    const proposal = await tables.propose(content, choices);
    const reading = await tables.read(content, proposal.choices);
    const shown = reading.cells.map((column) => column.slice(0, 200));
    expect(proposal.columns.map((_, column) => proposal.read.map((row) => row[column]))).toEqual(shown);
    expect(proposal.columns.map(({ kind, unit }) => [kind, unit])).toEqual(
      reading.columns.map(({ kind, unit }) => [kind, unit]),
    );
    return { proposal, reading };
  }

  it('of numbers is proposed and read back to the same numbers, however it is written', async () => {
    await fc.assert(
      fc.asyncProperty(cellsOf(hundredths), writings, async (numbers, writing) => {
        const rows = numbers.map((value, row) => [
          value === null ? writing.missing : numberText(value, writing),
          `w${row % 3}`,
          String(row + 10),
        ]);
        const { proposal, reading } = await proposedAndRead(written([header, ...rows], writing));
        expect(proposal.choices).toMatchObject({
          delimiter: writing.delimiter,
          decimal: writing.decimal,
          headerLine: writing.titles.length + 1,
        });
        expect(reading.cells[0]).toEqual(numbers.map((value) => (value === null ? null : value / 100)));
        expect(reading.columns.map(({ kind }) => kind)).toEqual(['numeric', 'category', 'numeric']);
        expect(reading.unreadable).toEqual([]);
        expect(proposal.columns[0].missingCount).toBe(numbers.filter((value) => value === null).length);
      }),
      { numRuns: 150 },
    );
  });

  it('of dates is read back to the same days when one of them, or a choice, settles the order', async () => {
    const form = fc.constantFrom(...(Object.keys(dateForms) as (keyof typeof dateForms)[]));
    await fc.assert(
      fc.asyncProperty(cellsOf(days), form, writings, fc.boolean(), async (dates, name, writing, chosen) => {
        // The last day of a month cannot be taken for a month.
        const all = chosen ? dates : [...dates, Date.UTC(2024, 0, 31) / 864e5];
        const rows = all.map((day, row) => [
          day === null ? writing.missing : dateForms[name](isoOf(day)),
          `w${row % 3}`,
          '1',
        ]);
        const dateOrder = name === 'day-first' || name === 'month-first' ? name : undefined;
        const columns: ColumnChoice[] = chosen && dateOrder ? [{ name: header[0], dateOrder }] : [];
        const { reading } = await proposedAndRead(written([header, ...rows], writing), { columns });
        expect(reading.columns[0].kind).toBe('date');
        expect(reading.cells[0]).toEqual(all.map((day) => (day === null ? null : isoOf(day))));
      }),
      { numRuns: 100 },
    );
  });

  it('of words keeps every one of them, letter for letter', async () => {
    await fc.assert(
      fc.asyncProperty(cellsOf(plainWords), writings, async (texts, writing) => {
        const rows = texts.map((text, row) => [text ?? writing.missing, `w${row % 3}`, String(row + 10)]);
        const quoted = { ...writing, quoteAll: true };
        const { reading } = await proposedAndRead(written([header, ...rows], quoted));
        expect(reading.cells[0]).toEqual(texts);
      }),
      { numRuns: 150 },
    );
  });

  it('is read under any choice of kinds, units and marks, and every cell is read, missing or counted as unreadable', async () => {
    const cell = fc.oneof(
      plainWords,
      fc.constantFrom(
        '',
        'NA',
        '12 m',
        '3 kg',
        '40 ft',
        '007',
        '1.234',
        '1,5',
        '999',
        '01/02/2024',
        '2024-05-06',
        '12%',
      ),
      fc.double().map(String),
    );
    const choice = fc.record<Omit<ColumnChoice, 'name'>>(
      {
        kind: fc.constantFrom('numeric', 'category', 'date', 'text'),
        unit: fc.constantFrom('m', 'kg', 'crates', null),
        dateOrder: fc.constantFrom('year-first', 'day-first', 'month-first'),
        missingMarks: fc.constantFrom(['999'], ['w'], ['12 m']),
      },
      { requiredKeys: ['kind'] },
    );
    const decimals = fc.option(fc.constantFrom('.' as const, ',' as const), { nil: undefined });
    await fc.assert(
      fc.asyncProperty(
        fc.array(cell, { minLength: 1, maxLength: 30 }),
        choice,
        decimals,
        async (texts, chosen, decimal) => {
          const rows = texts.map((text) => [text, 'w', '1']);
          const writing: Writing = {
            ...{ delimiter: ';', decimal: '.', thousands: '', unit: '', missing: '', quoteAll: true },
            ...{ lineEnd: '\n', titles: [], packing: 'plain' },
          };
          const { proposal, reading } = await proposedAndRead(written([header, ...rows], writing), {
            decimal,
            columns: [{ name: header[0], ...chosen }],
          });
          const [column] = proposal.columns;
          expect(reading.columns[0].kind).toBe(chosen.kind);
          const present = reading.cells[0].filter((value: Cell) => value !== null).length;
          expect(present + column.missingCount + column.unreadableCount).toBe(texts.length);
          expect(reading.unreadable).toEqual(
            column.unreadableCount > 0 ? [{ column: header[0], count: column.unreadableCount }] : [],
          );
          expect(column.unreadableRows).toHaveLength(column.unreadableCount);
        },
      ),
      { numRuns: 200 },
    );
  });
});
