import { NumberClass, NumberReader, type DecimalMark } from './number-cell';

/** How exports write "no reading". Compared trimmed and in lower case. `none` is not among them: it is an answer. */
const marks: ReadonlySet<string> = new Set([
  '',
  'na',
  'n/a',
  'n.a.',
  '#n/a',
  '#na',
  'nan',
  'null',
  'missing',
  '-',
  '--',
  '–',
  '—',
  '.',
  '?',
  '#value!',
  '#div/0!',
  '#ref!',
  '#name?',
  '#num!',
  '#null!',
]);

const longestMark = 8;

export function isMissing(text: string): boolean {
  if (text.length === 0) return true;
  const trimmed = text.trim();
  return trimmed.length <= longestMark && marks.has(trimmed.toLowerCase());
}

/** The usual marks, and those that were chosen for a column beside them. */
export class MissingMarks {
  private readonly texts: ReadonlySet<string>;

  constructor(readonly extra: readonly string[]) {
    this.texts = new Set(extra.map((mark) => mark.trim().toLowerCase()));
  }

  isMissing(text: string): boolean {
    return isMissing(text) || (this.texts.size > 0 && this.texts.has(text.trim().toLowerCase()));
  }

  /** The marks that are numbers: in a numeric column 999.0 is 999. Null without any, which most columns are. */
  numbersUnder(decimal: DecimalMark): ReadonlySet<number> | null {
    const reader = new NumberReader();
    const numbers = this.extra.flatMap((mark) => {
      if (reader.read(mark) === NumberClass.none) return [];
      const value = decimal === '.' ? reader.pointValue : reader.commaValue;
      return Number.isNaN(value) ? [] : [value];
    });
    return numbers.length > 0 ? new Set(numbers) : null;
  }
}

export const usualMarks = new MissingMarks([]);
