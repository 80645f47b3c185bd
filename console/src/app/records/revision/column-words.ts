import { formatReading } from '@widget/format/number-format';
import { precisionFor, roundTo } from '@widget/format/precision';
import type { ColumnKind, RecordColumn } from '../../api/contract';
import { NO_FIGURE, formatCount, formatShare } from '../../ui/figure';
import { formatRecordedDay } from '../../ui/moment';

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

export function missingOf({ missingCount }: RecordColumn, rowCount: number): string {
  if (missingCount === 0) return 'none';
  return `${formatCount(missingCount)} (${formatShare(missingCount / rowCount)})`;
}

export function distinctOf({ distinctCount }: RecordColumn): string {
  return distinctCount === null ? 'over a million' : formatCount(distinctCount);
}

type Cell = string | number | null;

/** One value of a row as it was recorded. */
export function cellOf(value: Cell, kind: ColumnKind | undefined): string {
  if (value === null) return '';
  if (typeof value === 'string') return value;
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
