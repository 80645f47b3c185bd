import { formatStepped, withUnit } from '@widget/format/number-format';
import { precisionFor, roundTo } from '@widget/format/precision';

export interface FigureOptions {
  readonly unit?: string | null;
  /** How far off the figure may be (a standard error, half an interval): it decides how many digits are honest. */
  readonly uncertainty?: number | null;
  /** Digits that count, where no uncertainty is known. */
  readonly significant?: number;
  readonly signed?: boolean;
}

/** Stands where there is no figure. */
export const NO_FIGURE = '–';

const LOCALE = 'en-GB';
const DEFAULT_SIGNIFICANT = 4;

/**
 * A figure with the digits it deserves. With an uncertainty, digits stop where its second significant digit
 * stands (512.378 ± 38 gives 512; ± 3.8 gives 512.4; ± 380 gives 510). Without one, four significant digits,
 * no noughts added, and a whole number stays whole.
 */
export function formatFigure(value: number | null | undefined, options: FigureOptions = {}): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_FIGURE;
  const step = stepOf(value, options);
  const figure = digitsAreKnown(options) ? formatStepped(value, step, LOCALE) : formatPlain(roundTo(value, step));
  const plus = options.signed && value > 0 && /[1-9]/.test(figure) ? '+' : '';
  return withUnit(plus + figure, options.unit);
}

/** Noughts at the end say that the digits count, so they are written only where somebody knows that they do. */
function digitsAreKnown({ uncertainty, significant }: FigureOptions): boolean {
  return Boolean(uncertainty) || significant !== undefined;
}

function formatPlain(value: number): string {
  return value.toLocaleString(LOCALE, { maximumSignificantDigits: 15 }).replace('-', '\u2212');
}

function stepOf(value: number, { uncertainty, significant }: FigureOptions): number {
  if (uncertainty && Number.isFinite(uncertainty)) return stepFor(value, Math.abs(uncertainty));
  if (Number.isInteger(value)) return 1;
  const magnitude = Math.floor(Math.log10(Math.abs(value)));
  return Math.min(1, Number(`1e${magnitude - (significant ?? DEFAULT_SIGNIFICANT) + 1}`));
}

function stepFor(value: number, uncertainty: number): number {
  return precisionFor({ value, low: value - uncertainty, high: value + uncertainty }).step;
}

/** A count: whole, with thousands marked. */
export function formatCount(count: number): string {
  return count.toLocaleString(LOCALE, { maximumFractionDigits: 0 });
}

/** `1 row`, `2,391 rows`. */
export function countOf(count: number, one: string, many = `${one}s`): string {
  return `${formatCount(count)} ${count === 1 ? one : many}`;
}

/** A share as a percentage: whole, but never rounded to 0% or 100% when it is neither. */
export function formatShare(share: number): string {
  if (share > 0 && share < 0.005) return 'under 1%';
  if (share < 1 && share > 0.995) return 'over 99%';
  return `${Math.round(share * 100)}%`;
}

const BYTE_UNITS = ['bytes', 'kB', 'MB', 'GB'];

export function formatBytes(bytes: number): string {
  const step = bytes < 1000 ? 0 : Math.min(BYTE_UNITS.length - 1, Math.floor(Math.log10(bytes) / 3));
  return formatFigure(bytes / 1000 ** step, { unit: BYTE_UNITS[step], significant: 3 });
}
