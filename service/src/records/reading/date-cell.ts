/** Ways of writing a date, as bits: what a column's cells have in common is the AND of their bits. */
export const DateForm = { none: 0, iso: 1, dayFirst: 2, monthFirst: 4, isoMonth: 8, named: 16 } as const;

export const everyDateForm = 31;

const millisecondsPerDay = 86_400_000;
const timePart = '(?:[T ](\\d{1,2}):(\\d{2})(?::(\\d{2}(?:\\.\\d{1,9})?))?\\s?(Z|[+-]\\d{2}:?\\d{2})?)?';
const isoPattern = new RegExp(`^(\\d{4})([-/])(\\d{1,2})\\2(\\d{1,2})${timePart}$`);
const numberPattern = new RegExp(`^(\\d{1,2})([./-])(\\d{1,2})\\2(\\d{4}|\\d{2})${timePart}$`);
const monthPattern = /^(\d{4})-(\d{2})$/;
const namedPattern = new RegExp(`^(\\d{1,2})[ -]([A-Za-z]{3,9})\\.?[ -](\\d{4})${timePart}$`);
const months = [
  'january',
  'february',
  'march',
  'april',
  'may',
  'june',
  'july',
  'august',
  'september',
  'october',
  'november',
  'december',
];

/** Days since 1970-01-01 (UTC), or NaN when there is no such day. */
function daysOf(year: number, month: number, day: number): number {
  if (month < 1 || month > 12 || day < 1 || day > 31) return NaN;
  const time = Date.UTC(year, month - 1, day);
  return new Date(time).getUTCDate() === day && year >= 1000 ? time / millisecondsPerDay : NaN;
}

/** Two digits stand for 1969 to 2068 (POSIX.1-2017, strptime, %y). */
const fullYear = (digits: string): number => {
  const year = Number(digits);
  return digits.length === 4 ? year : year < 69 ? 2000 + year : 1900 + year;
};

/** The time of day as a part of a day; without a zone it is taken as written. */
function partOfDay([hours, minutes, seconds, zone]: readonly (string | undefined)[]): number {
  if (hours === undefined || minutes === undefined) return 0;
  const [h, m, s] = [Number(hours), Number(minutes), Number(seconds ?? 0)];
  if (h > 23 || m > 59 || s >= 60) return NaN;
  const sign = zone?.startsWith('-') ? -1 : 1;
  const offset = !zone || zone === 'Z' ? 0 : sign * (Number(zone.slice(1, 3)) * 60 + Number(zone.slice(-2)));
  return ((h * 60 + m - offset) * 60 + s) / 86_400;
}

const monthNamed = (name: string): number => {
  const wanted = name.toLowerCase();
  return (
    months.findIndex(
      (month) => month === wanted || month.slice(0, 3) === wanted || (wanted === 'sept' && month === 'september'),
    ) + 1
  );
};

/** Reads cells one after another: `read` answers the forms that the cell has; `valueOf` the days. */
export class DateReader {
  private iso = NaN;
  private dayFirst = NaN;
  private monthFirst = NaN;
  private isoMonth = NaN;
  private named = NaN;

  /** The forms that the cell read last has. */
  forms: number = DateForm.none;

  read(given: string): number {
    this.forms = this.formsOf(given);
    return this.forms;
  }

  /** Under the one of these forms that the cell has; NaN when it has none of them. */
  valueOf(forms: number): number {
    const form = forms & this.forms;
    if (form & DateForm.iso) return this.iso;
    if (form & DateForm.dayFirst) return this.dayFirst;
    if (form & DateForm.monthFirst) return this.monthFirst;
    if (form & DateForm.isoMonth) return this.isoMonth;
    return form & DateForm.named ? this.named : NaN;
  }

  private formsOf(given: string): number {
    const text = given.trim();
    this.iso = this.dayFirst = this.monthFirst = this.isoMonth = this.named = NaN;
    if (text.length < 6 || text.length > 40) return DateForm.none;
    this.readForms(text);
    return (
      (this.iso === this.iso ? DateForm.iso : 0) |
      (this.dayFirst === this.dayFirst ? DateForm.dayFirst : 0) |
      (this.monthFirst === this.monthFirst ? DateForm.monthFirst : 0) |
      (this.isoMonth === this.isoMonth ? DateForm.isoMonth : 0) |
      (this.named === this.named ? DateForm.named : 0)
    );
  }

  private readForms(text: string): void {
    const iso = isoPattern.exec(text);
    if (iso) this.iso = daysOf(Number(iso[1]), Number(iso[3]), Number(iso[4])) + partOfDay(iso.slice(5));
    const numbers = iso ? null : numberPattern.exec(text);
    // With dashes and two digits the year might stand first: not a date that can be told.
    if (numbers && (numbers[4].length === 4 || numbers[2] !== '-')) {
      const [first, second, year] = [Number(numbers[1]), Number(numbers[3]), fullYear(numbers[4])];
      const part = partOfDay(numbers.slice(5));
      this.dayFirst = daysOf(year, second, first) + part;
      // With points the day always comes first.
      if (numbers[2] !== '.') this.monthFirst = daysOf(year, first, second) + part;
    }
    const month = monthPattern.exec(text);
    if (month) this.isoMonth = daysOf(Number(month[1]), Number(month[2]), 1);
    const named = namedPattern.exec(text);
    if (named)
      this.named = daysOf(Number(named[3]), monthNamed(named[2]), Number(named[1])) + partOfDay(named.slice(4));
  }
}

/** `2026-03-01`, or with the time of day when there is one. */
export function dateText(days: number): string {
  const text = new Date(Math.round(days * millisecondsPerDay)).toISOString();
  return Number.isInteger(days) ? text.slice(0, 10) : text.replace('.000Z', 'Z');
}
