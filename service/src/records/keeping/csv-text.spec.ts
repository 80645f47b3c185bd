import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import type { CellValue } from '../revision-rows';
import { csvText } from './csv-text';

/** Common practice (OWASP, "CSV Injection"): = + - @, tab, carriage return, line feed; and the full-width forms. */
const formulaBeginnings = ['=', '+', '-', '@', '\t', '\r', '\n', '＝', '＋', '－', '＠'];
const read = (text: string): string[][] => parse(text, { record_delimiter: '\r\n' });

const text = fc.oneof(
  fc.string({ unit: 'binary', minLength: 1 }),
  fc
    .tuple(fc.constantFrom(...formulaBeginnings, '"', ',', "'"), fc.string())
    .map(([beginning, rest]) => beginning + rest),
);
const cell: fc.Arbitrary<CellValue> = fc.oneof(
  text,
  fc.constant(null),
  fc.double({ noNaN: true, noDefaultInfinity: true }),
);
const table = fc
  .integer({ min: 1, max: 6 })
  .chain((width) => fc.array(fc.array(cell, { minLength: width, maxLength: width }), { minLength: 1, maxLength: 8 }));

describe('a table as CSV', () => {
  it('has no text cell that a spreadsheet would take for a formula', () => {
    fc.assert(
      fc.property(table, (rows) => {
        const cells = read(csvText(rows));
        rows.forEach((row, at) =>
          row.forEach((given, column) => {
            if (typeof given === 'string') expect(formulaBeginnings).not.toContain(cells[at][column][0]);
          }),
        );
      }),
    );
  });

  it('reads back cell for cell, but for the apostrophe before such a text', () => {
    fc.assert(
      fc.property(table, (rows) => {
        const expected = rows.map((row) =>
          row.map((given) => {
            if (typeof given === 'number') return String(given);
            return formulaBeginnings.includes((given ?? '')[0]) ? `'${given}` : (given ?? '');
          }),
        );
        expect(read(csvText(rows))).toEqual(expected);
      }),
    );
  });

  it('keeps a negative number a number, and quotes what would part it', () => {
    expect(csvText([[-1.5, '-1.5', 'a,"b"', null, '=1+1', '1\r\n2']])).toBe(`-1.5,'-1.5,"a,""b""",,'=1+1,"1\r\n2"\r\n`);
  });

  it('writes an empty cell of a table of one column so that its line is not empty', () => {
    expect(csvText([[null], ['a']])).toBe('""\r\na\r\n');
  });
});
