import { isUtf8 } from 'node:buffer';
import { detectDelimiter, splitSample, type Delimiter } from './delimiter';
import { findHeaderLine } from './header-line';
import type { ReadingChoices } from './reading-choices';
import { TableProblem } from './table-problem';

export type TextEncoding = 'utf-8' | 'utf-16le' | 'utf-16be';

/** How a file is written; a workbook has neither encoding nor delimiter. */
export interface FileFormat {
  readonly encoding: TextEncoding | '';
  readonly delimiter: Delimiter | '';
  /** The line, or the sheet's row, that names the columns; what stands above it is passed over. */
  readonly headerLine: number;
}

export interface TextFormat extends FileFormat {
  readonly encoding: TextEncoding;
  readonly delimiter: Delimiter;
  /** Whether spaces around cells are padding. */
  readonly padded: boolean;
}

interface KnownFile {
  readonly begins: readonly (readonly number[])[];
  readonly what: string;
  readonly remedy: string;
}

const bytes = (text: string): number[] => [...Buffer.from(text, 'latin1')];

/** First bytes of files that are often taken for tables. From the formats' own specifications. */
const knownFiles: readonly KnownFile[] = [
  {
    begins: [
      [0x50, 0x4b, 3, 4],
      [0x50, 0x4b, 5, 6],
    ],
    what: 'a zip file or a spreadsheet workbook',
    remedy: 'Open it and save the sheet as “CSV UTF-8”.',
  },
  {
    begins: [[0xd0, 0xcf, 0x11, 0xe0]],
    what: 'an old spreadsheet workbook or document',
    remedy: 'Open it and save the sheet as “CSV UTF-8”.',
  },
  { begins: [bytes('%PDF')], what: 'a PDF document', remedy: 'Ask for the table as a CSV file.' },
  {
    begins: [[0x89, 0x50, 0x4e, 0x47], [0xff, 0xd8, 0xff], bytes('GIF8')],
    what: 'a picture',
    remedy: 'Ask for the table as a CSV file.',
  },
  { begins: [bytes('SQLite format')], what: 'a database', remedy: 'Export the table as a CSV file.' },
  {
    begins: [bytes('BZh'), [0xfd, 0x37, 0x7a], [0x28, 0xb5, 0x2f, 0xfd], bytes('7z')],
    what: 'a compressed file',
    remedy: 'Unpack it first, or pack it with gzip.',
  },
];

const notTable = (what: string, remedy: string): TableProblem =>
  new TableProblem('file-not-table', `The file is ${what}, not a table of text. ${remedy}`, 1);

function refuseKnownFiles(sample: Buffer): void {
  for (const { begins, what, remedy } of knownFiles) {
    if (begins.some((start) => start.every((byte, at) => sample[at] === byte))) throw notTable(what, remedy);
  }
}

function refuseMarkup(text: string): void {
  const start = text.trimStart().slice(0, 200).toLowerCase();
  if (/^<(!doctype|html|head|body|table|\?xml|svg|div)\b/.test(start))
    throw notTable(
      'a web page or XML',
      'Ask for the table as a CSV file; a sign-in page may have been saved in its place.',
    );
  if (/^(\{\s*"|\[\s*[{["])/.test(start)) throw notTable('JSON', 'Ask for the table as a CSV file.');
}

function encodingOf(sample: Buffer): TextEncoding {
  if (sample[0] === 0xff && sample[1] === 0xfe) return 'utf-16le';
  if (sample[0] === 0xfe && sample[1] === 0xff) return 'utf-16be';
  return 'utf-8';
}

/** The sample as text; bytes that are not UTF-8 become marks here and are refused, with their line, when the file is read. */
function sampleText(sample: Buffer, encoding: TextEncoding): string {
  return new TextDecoder(encoding).decode(sample, { stream: true });
}

const isPadded = (text: string, delimiter: Delimiter): boolean => {
  if (delimiter === '\t') return false;
  const inner = splitSample(text, delimiter).flatMap(({ cells }) => cells.slice(1));
  return inner.length > 0 && inner.filter((cell) => cell.startsWith(' ')).length > inner.length * 0.8;
};

/** Finds out how a file of text is written from its beginning and from what was chosen, or says why it is not a table. */
export function detectFormat(sample: Buffer, complete: boolean, choices: ReadingChoices = {}): TextFormat {
  refuseKnownFiles(sample);
  const encoding = encodingOf(sample);
  if (encoding === 'utf-8' && sample.includes(0)) refuseNul(sample);
  const text = sampleText(sample, encoding);
  refuseMarkup(text);
  if (text.trim() === '' && complete)
    throw new TableProblem('file-empty', 'The file is empty. Send a table with a header line and at least one row.', 1);
  const delimiter = choices.delimiter ?? detectDelimiter(text, complete);
  const headerLine = choices.headerLine ?? findHeaderLine(splitSample(text, delimiter));
  return { encoding, delimiter, padded: isPadded(text, delimiter), headerLine };
}

/** Text in two-byte characters has a NUL in every other byte. */
function refuseNul(sample: Buffer): void {
  const at = sample.indexOf(0);
  const line = sample
    .subarray(0, at)
    .toString('latin1')
    .split(/\r\n|\n|\r/).length;
  const nulShare = sample.filter((byte) => byte === 0).length / sample.length;
  if (nulShare > 0.3 && nulShare < 0.6)
    throw new TableProblem(
      'file-encoding',
      'The file looks like UTF-16 text without its byte order mark. Save it as “CSV UTF-8”.',
      line,
    );
  throw new TableProblem(
    'file-not-table',
    `Line ${line} holds a NUL byte${isUtf8(sample) ? '' : ' and bytes that are not text'}: the file is not a table of text. Export it again as “CSV UTF-8”.`,
    line,
  );
}
