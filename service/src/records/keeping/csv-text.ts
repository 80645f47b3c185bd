import { stringify } from 'csv-stringify/sync';
import type { CellValue } from '../revision-rows';

/** For spreadsheets, which would otherwise take UTF-8 for an older encoding. */
export const byteOrderMark = '\uFEFF';

/**
 * Rows as CSV (RFC 4180: comma, CR LF, cells quoted where they must be). A text that a spreadsheet would take for a
 * formula gets an apostrophe before it: the library does so for = + - @, tab, carriage return and the full-width forms
 * of the four; a line feed, which OWASP ("CSV Injection") lists as well, is added here. Numbers stay numbers, negative
 * ones too. An empty cell of a table of one column is written "", since the line would otherwise be empty.
 */
export function csvText(rows: readonly (readonly CellValue[])[]): string {
  return stringify(rows as CellValue[][], {
    escape_formulas: true,
    record_delimiter: 'windows',
    quoted_match: /[\r\n]/,
    quoted_empty: rows[0]?.length === 1,
    cast: { string: (text) => (text.startsWith('\n') ? `'${text}` : text) },
  });
}
