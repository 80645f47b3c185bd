import { formatReading, withUnit } from '@widget/format/number-format';
import { precisionFor, roundTo } from '@widget/format/precision';
import type { ColumnKind, RecordColumn } from '../../api/contract';
import { NO_FIGURE, formatCount, formatShare } from '../../ui/figure';
import { daysOf, formatRecordedDay } from '../../ui/moment';

type Outlying = NonNullable<RecordColumn['outlying']>;

const LOCALE = 'en-GB';

export const KIND_WORDS: Readonly<Record<ColumnKind, string>> = {
  numeric: 'Number',
  category: 'Category',
  date: 'Date',
  text: 'Text',
};

/** `0.8 to 21.4`, the unit standing elsewhere; dates as days of the calendar. */
export function rangeOf({ kind, minimum, maximum }: RecordColumn): string {
  if (minimum === null || maximum === null) return NO_FIGURE;
  if (kind === 'date') return `${formatRecordedDay(minimum)} to ${formatRecordedDay(maximum)}`;
  return `${formatReading(minimum, LOCALE)} to ${formatReading(maximum, LOCALE)}`;
}

/** The mean, with no more digits than the spread of the records lets count. */
export function meanOf({ kind, mean, standardDeviation }: RecordColumn): string {
  if (mean === null || kind !== 'numeric') return NO_FIGURE;
  return rounded(mean, standardDeviation);
}

/** The standard deviation, to two significant digits. */
export function spreadOf({ kind, standardDeviation }: RecordColumn): string {
  if (standardDeviation === null || kind !== 'numeric') return NO_FIGURE;
  return rounded(standardDeviation, standardDeviation);
}

function rounded(value: number, spread: number | null): string {
  const { step } = precisionFor({ value, low: value - (spread ?? 0), high: value + (spread ?? 0) });
  return formatReading(roundTo(value, step), LOCALE);
}

/** Digits of a figure taken from between readings: more would come from the arithmetic and not from the records. */
const DIGITS_BETWEEN_READINGS = 4;

/** A quantile or the end of a bar, which need not be a reading. */
export function betweenReadings(value: number, kind: ColumnKind): string {
  return kind === 'date'
    ? formatRecordedDay(Math.floor(value))
    : formatReading(Number(value.toPrecision(DIGITS_BETWEEN_READINGS)), LOCALE);
}

const SHARE_WORDS: Readonly<Record<number, string>> = { 0.25: 'Lower quartile', 0.5: 'Median', 0.75: 'Upper quartile' };

/** `Median`, `1%`, `99%`. */
export function shareWords(share: number): string {
  return SHARE_WORDS[share] ?? `${Number((100 * share).toPrecision(3))}%`;
}

/** What counts as outlying, and how many readings do. */
export function outlyingWords(outlying: Outlying, { kind, unit }: Pick<RecordColumn, 'kind' | 'unit'>): string {
  const end = (value: number): string => withUnit(betweenReadings(value, kind), unit);
  const further = 'further than 5 scaled median absolute deviations from the median';
  const ends = `below ${end(outlying.low)} or above ${end(outlying.high)}`;
  if (outlying.count === 0) return `No reading lies ${further}: ${ends}.`;
  const readings = outlying.count === 1 ? '1 reading lies' : `${formatCount(outlying.count)} readings lie`;
  return `${readings} ${further}: ${ends}.`;
}

export function unreadableWords(count: number, kind: ColumnKind): string {
  const cells = count === 1 ? '1 cell of the file was' : `${formatCount(count)} cells of the file were`;
  return `${cells} not readable as a ${KIND_WORDS[kind].toLowerCase()} and ${count === 1 ? 'counts' : 'count'} as missing.`;
}

export function missingOf({ missingCount }: RecordColumn, rowCount: number): string {
  if (missingCount === 0) return 'none';
  return `${formatCount(missingCount)} (${formatShare(missingCount / rowCount)})`;
}

export function distinctOf({ distinctCount }: RecordColumn): string {
  return distinctCount === null ? 'over a million' : formatCount(distinctCount);
}

type Cell = string | number | null;

const CALENDAR_DAY = /^\d{4}-\d{2}-\d{2}$/;

/** One value of a row as it was recorded; a day comes as year-month-day or counted from 1970-01-01. */
export function cellOf(value: Cell, kind: ColumnKind | undefined): string {
  if (value === null) return '';
  if (typeof value === 'string')
    return kind === 'date' && CALENDAR_DAY.test(value) ? formatRecordedDay(daysOf(value)) : value;
  return kind === 'date' ? formatRecordedDay(value) : formatReading(value, LOCALE);
}

const MOST_DECIMALS = 6;

/** The values of one column on one page; figures get as many decimals as the one with most, so that they line up. */
export function cellsOf(values: readonly Cell[], kind: ColumnKind | undefined): readonly string[] {
  if (kind !== 'numeric') return values.map((value) => cellOf(value, kind));
  const texts = values.map((value) => cellOf(value, kind));
  const decimals = Math.min(MOST_DECIMALS, Math.max(...texts.map((text) => text.split('.')[1]?.length ?? 0)));
  return texts.map((text) => padded(text, decimals));
}

function padded(text: string, decimals: number): string {
  if (text === '' || decimals === 0) return text;
  const [whole, fraction = ''] = text.split('.');
  return `${whole}.${fraction.padEnd(decimals, '0')}`;
}
