import { formatStepped, withUnit } from './number-format';
import { Precision } from './precision';

export interface StatedInterval {
  readonly level: number;
  readonly low: number | null;
  readonly high: number | null;
}

export interface WordsOptions {
  readonly unit: string;
  readonly precision: Precision;
  readonly locale?: string;
}

const SHARES: Readonly<Record<string, string>> = {
  '50': 'half of',
  '66': 'two of three',
  '67': 'two of three',
  '75': 'three of four',
  '80': 'eight of ten',
  '90': 'nine of ten',
  '95': '19 of 20',
  '99': '99 of 100',
};

/** "nine of ten such cases come to between 440 and 590 hours". Natural frequencies are read more safely than percentages. */
export function intervalInWords(
  { level, low, high }: StatedInterval,
  { unit, precision, locale }: WordsOptions,
): string {
  const figure = (end: number): string => formatStepped(end, precision.endStep, locale);
  const share = shareInWords(level);
  if (low !== null && high !== null) {
    return `${share} such cases come to between ${figure(low)} and ${withUnit(figure(high), unit)}`;
  }
  if (low !== null) {
    return `${share} such cases come to ${withUnit(figure(low), unit)} or more; the records are too few to bound it above`;
  }
  if (high !== null) {
    return `${share} such cases come to ${withUnit(figure(high), unit)} or less; the records are too few to bound it below`;
  }
  return 'the records are too few to say how far off this may be';
}

export function shareInWords(level: number): string {
  const percent = Number((level * 100).toFixed(1));
  return SHARES[String(percent)] ?? `${percent} of 100`;
}

export function asSentence(words: string): string {
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;
}
