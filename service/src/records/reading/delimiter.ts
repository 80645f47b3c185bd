import { NumberClass, NumberReader } from './number-cell';

export const delimiters = [',', ';', '\t', '|'] as const;
export type Delimiter = (typeof delimiters)[number];

const sampleRecords = 200;

export interface SampleRecord {
  readonly cells: readonly string[];
  /** The line it begins on. */
  readonly line: number;
}

/** Records of a sample as lists of cells, quotes taken into account: good enough to compare delimiters. */
export function splitSample(text: string, delimiter: string): SampleRecord[] {
  const records: SampleRecord[] = [];
  let cells: string[] = [];
  let cell = '';
  let quoted = false;
  let line = 1;
  let begun = 1;
  const endRecord = (): void => {
    if (cells.length > 0 || cell.trim() !== '') records.push({ cells: [...cells, cell], line: begun });
    cells = [];
    cell = '';
  };
  for (let at = 0; at < text.length && records.length < sampleRecords; at++) {
    const character = text[at];
    const lineEnds = character === '\n' || (character === '\r' && text[at + 1] !== '\n');
    if (lineEnds) line++;
    if (quoted) {
      if (character !== '"') cell += character;
      else if (text[at + 1] === '"') cell += text[++at];
      else quoted = false;
    } else if (character === '"' && cell.trim() === '') quoted = true;
    else if (character === delimiter) {
      cells.push(cell);
      cell = '';
    } else if (character === '\n' || character === '\r') {
      endRecord();
      begun = line;
    } else cell += character;
  }
  if (records.length < sampleRecords) endRecord();
  return records;
}

interface Candidate {
  readonly delimiter: Delimiter;
  readonly width: number;
  /** Share of the records that are as wide as most are. */
  readonly even: number;
  /** Share of the cells of these records that are numbers. */
  readonly numbers: number;
}

/** The width that most of the records have; between equals that of the earlier ones. */
export function usualWidth(records: readonly SampleRecord[]): number {
  const counts = new Map<number, number>();
  for (const { cells } of records) counts.set(cells.length, (counts.get(cells.length) ?? 0) + 1);
  let usual = 0;
  for (const [width, count] of counts) if (count > (counts.get(usual) ?? 0)) usual = width;
  return usual;
}

function judge(text: string, delimiter: Delimiter, complete: boolean): Candidate {
  const split = splitSample(text, delimiter);
  // The sample may end inside its last record.
  const records = complete || split.length < 3 || split.length === sampleRecords ? split : split.slice(0, -1);
  const width = usualWidth(records);
  const even = records.filter((record) => record.cells.length === width);
  const reader = new NumberReader();
  const cells = even.slice(1).flatMap((record) => record.cells.filter((cell) => cell !== ''));
  const numbers = cells.filter((cell) => reader.read(cell) !== NumberClass.none).length;
  return {
    delimiter,
    width,
    even: even.length / Math.max(1, records.length),
    numbers: numbers / Math.max(1, cells.length),
  };
}

/**
 * The delimiter under which the records are most evenly wide; between equals the one that leaves most cells as numbers
 * (a decimal comma is not a delimiter), then the one that makes most columns. Lines above the header do not hinder,
 * while most lines are rows. A file of one column has no delimiter and reads as comma separated.
 */
export function detectDelimiter(text: string, complete: boolean): Delimiter {
  const candidates = delimiters
    .map((delimiter) => judge(text, delimiter, complete))
    .filter((candidate) => candidate.width > 1);
  candidates.sort((a, b) => b.even - a.even || b.numbers - a.numbers || b.width - a.width);
  return candidates[0]?.delimiter ?? ',';
}
