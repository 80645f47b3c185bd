import { NumberClass, NumberReader } from './number-cell';

export const delimiters = [',', ';', '\t', '|'] as const;
export type Delimiter = (typeof delimiters)[number];

const sampleRecords = 200;

/** Records of a sample as lists of cells, quotes taken into account: good enough to compare delimiters. */
export function splitSample(text: string, delimiter: string): string[][] {
  const records: string[][] = [];
  let cells: string[] = [];
  let cell = '';
  let quoted = false;
  const endRecord = (): void => {
    if (cells.length > 0 || cell.trim() !== '') records.push([...cells, cell]);
    cells = [];
    cell = '';
  };
  for (let at = 0; at < text.length && records.length < sampleRecords; at++) {
    const character = text[at];
    if (quoted) {
      if (character !== '"') cell += character;
      else if (text[at + 1] === '"') cell += text[++at];
      else quoted = false;
    } else if (character === '"' && cell.trim() === '') quoted = true;
    else if (character === delimiter) {
      cells.push(cell);
      cell = '';
    } else if (character === '\n' || character === '\r') endRecord();
    else cell += character;
  }
  if (records.length < sampleRecords) endRecord();
  return records;
}

interface Candidate {
  readonly delimiter: Delimiter;
  readonly width: number;
  /** Share of the records as wide as the header. */
  readonly even: number;
  /** Share of the cells below the header that are numbers. */
  readonly numbers: number;
}

function judge(text: string, delimiter: Delimiter, complete: boolean): Candidate {
  const split = splitSample(text, delimiter);
  // The sample may end inside its last record.
  const records = complete || split.length < 3 || split.length === sampleRecords ? split : split.slice(0, -1);
  const width = records[0]?.length ?? 0;
  const rows = records.slice(1);
  const reader = new NumberReader();
  const cells = rows.flat().filter((cell) => cell !== '');
  const numbers = cells.filter((cell) => reader.read(cell) !== NumberClass.none).length;
  return {
    delimiter,
    width,
    even: rows.length === 0 ? 1 : rows.filter((row) => row.length === width).length / rows.length,
    numbers: numbers / Math.max(1, cells.length),
  };
}

/**
 * The delimiter under which the records are most evenly as wide as the header; between equals the one that leaves
 * most cells as numbers (a decimal comma is not a delimiter), then the one that makes most columns. A file of one
 * column has none in its header and reads as comma separated.
 */
export function detectDelimiter(text: string, complete: boolean): Delimiter {
  const candidates = delimiters
    .map((delimiter) => judge(text, delimiter, complete))
    .filter((candidate) => candidate.width > 1);
  candidates.sort((a, b) => b.even - a.even || b.numbers - a.numbers || b.width - a.width);
  return candidates[0]?.delimiter ?? ',';
}
