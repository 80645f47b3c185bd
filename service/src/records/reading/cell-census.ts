import { newCellReaders } from './column-evidence';
import type { ColumnPlan } from './column-plan';
import { NumberClass } from './number-cell';

/** How many of a column's cells are what; for the doubts that a person should hear of. */
export interface CellCensus {
  readonly numbers: number;
  readonly withUnit: number;
  readonly dates: number;
  readonly words: number;
  /** Digits with zeros in front. */
  readonly leadingZeros: number;
  /** A word, and a number whose mark could be decimal or grouping, for the sentences. */
  readonly word: string | null;
  readonly doubtfulNumber: string | null;
  /** Dates whose year has two digits. */
  readonly shortYears: number;
  /** Missing because a spreadsheet wrote an error there. */
  readonly errors: number;
  readonly error: string | null;
}

const shortYear = /^\s*\d{1,2}([./])\d{1,2}\1\d{2}(?!\d)/;
const zerosInFront = /^\s*0\d+\s*$/;

export function takeCensus(plan: ColumnPlan, rows: readonly (readonly string[])[]): CellCensus {
  const readers = newCellReaders();
  const counts = { numbers: 0, withUnit: 0, dates: 0, words: 0, leadingZeros: 0, shortYears: 0, errors: 0 };
  let word: string | null = null;
  let doubtfulNumber: string | null = null;
  let error: string | null = null;
  for (const row of rows) {
    const text = row[plan.position];
    if (plan.marks.isMissing(text)) {
      if (!text.trimStart().startsWith('#')) continue;
      counts.errors++;
      error ??= text;
      continue;
    }
    const numberClass = readers.numbers.read(text);
    if (numberClass !== NumberClass.none) {
      counts.numbers++;
      if (numberClass === NumberClass.pointOrGroup || numberClass === NumberClass.commaOrGroup) doubtfulNumber ??= text;
    } else if (readers.dates.read(text) !== 0) {
      counts.dates++;
      if (shortYear.test(text)) counts.shortYears++;
    } else if (readers.units.read(text) !== NumberClass.none) counts.withUnit++;
    else if (zerosInFront.test(text)) counts.leadingZeros++;
    else {
      counts.words++;
      word ??= text;
    }
  }
  return { ...counts, word, doubtfulNumber, error };
}
