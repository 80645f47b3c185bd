import { pipeline } from 'node:stream/promises';
import { parse, type CsvError, type Info, type Parser } from 'csv-parse';
import { checkedText } from './checked-text';
import { fileBytes, type OnBytes } from './file-bytes';
import type { TextFormat } from './file-format';
import { maximumRowBytes } from './limits';
import { TableProblem } from './table-problem';

const isCsvError = (error: unknown): error is CsvError & Info =>
  error instanceof Error && /^(CSV_|INVALID_)/.test(String((error as { code?: unknown }).code));

function newParser(format: TextFormat, withLines: boolean): Parser {
  return parse({
    delimiter: format.delimiter,
    from_line: format.headerLine,
    relax_quotes: true,
    skip_empty_lines: true,
    skip_records_with_empty_values: true,
    trim: format.padded,
    info: withLines,
  });
}

/** Fed on and on without a row coming out: a quotation mark stands open. */
async function* guardRowLength(chunks: AsyncIterable<Buffer>, rowsSoFar: () => number): AsyncGenerator<Buffer> {
  let rows = -1;
  let since = 0;
  for await (const chunk of chunks) {
    const now = rowsSoFar();
    since = now === rows ? since + chunk.length : 0;
    rows = now;
    if (since > maximumRowBytes) throw new OpenQuote();
    yield chunk;
  }
}

class OpenQuote extends Error {}

interface Run {
  readonly path: string;
  readonly format: TextFormat;
  readonly parser: Parser;
  readonly onBytes?: OnBytes;
}

async function run({ path, format, parser, onBytes }: Run, onRow: (row: unknown) => void): Promise<void> {
  let rows = 0;
  parser.on('data', (row: unknown) => {
    try {
      rows++;
      onRow(row);
    } catch (error) {
      parser.destroy(error instanceof Error ? error : new Error(String(error)));
    }
  });
  const text = checkedText(fileBytes(path, onBytes), format);
  await pipeline(
    guardRowLength(text, () => rows),
    parser,
  );
}

/** The line on which the row after the last whole one begins: where an open quotation mark must stand. */
async function lineAfterLastRow(path: string, format: TextFormat): Promise<number> {
  let line = format.headerLine - 1;
  const remember = (row: unknown): void => void (line = (row as { info: Info }).info.lines);
  await run({ path, format, parser: newParser(format, true) }, remember).catch(() => undefined);
  return line + 1;
}

async function translate(error: unknown, path: string, format: TextFormat): Promise<unknown> {
  if (error instanceof OpenQuote || (isCsvError(error) && error.code === 'CSV_QUOTE_NOT_CLOSED')) {
    const line = await lineAfterLastRow(path, format);
    return new TableProblem(
      'file-ragged',
      `A quotation mark opened on line ${line} is never closed. Close it, or remove it.`,
      line,
    );
  }
  if (!isCsvError(error)) return error;
  if (error.code === 'CSV_RECORD_INCONSISTENT_FIELDS_LENGTH') return raggedProblem(error);
  return new TableProblem(
    'file-not-table',
    `Line ${error.lines} cannot be read as a row of a table. Check its quotation marks.`,
    error.lines,
  );
}

function raggedProblem(error: CsvError & Info): TableProblem {
  const [, expected, found] = /expect (\d+), got (\d+)/.exec(error.message) ?? [];
  const few = Number(found) < Number(expected);
  const remedy = few
    ? 'Fill it up, or put text that holds a line break in quotation marks.'
    : 'Put text that holds the delimiter in quotation marks; choose another header line if titles stand above the names.';
  return new TableProblem(
    'file-ragged',
    `Line ${error.lines} has ${found} ${found === '1' ? 'cell' : 'cells'} where the header has ${expected}. ${remedy}`,
    error.lines,
  );
}

/** Parses the file, handing over one row of text after another, the header first. Blank rows are passed over. */
export async function parseRows(
  path: string,
  format: TextFormat,
  onRow: (cells: readonly string[]) => void,
  onBytes?: OnBytes,
): Promise<void> {
  try {
    const parser = newParser(format, false);
    await run({ path, format, parser, onBytes }, (row) => onRow(row as readonly string[]));
  } catch (error) {
    throw await translate(error, path, format);
  }
}
