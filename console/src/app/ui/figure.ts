export interface FigureOptions {
  readonly unit?: string;
  /** How far off the figure may be (a standard error, half an interval): it decides how many digits are honest. */
  readonly uncertainty?: number | null;
  /** Digits that count, where no uncertainty is known. */
  readonly significant?: number;
  readonly signed?: boolean;
}

/** Stands where there is no figure. */
export const NO_FIGURE = '–';

const MINUS = '\u2212';
const NARROW_SPACE = '\u202f';
const DEFAULT_SIGNIFICANT = 4;

/**
 * A figure with the digits it deserves. With an uncertainty, digits stop where its second significant digit
 * stands (512.378 ± 38 gives 512; ± 3.8 gives 512.4; ± 380 gives 510). Without one, four significant digits,
 * but a whole number stays whole.
 */
export function formatFigure(value: number | null | undefined, options: FigureOptions = {}): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_FIGURE;
  const rounded = roundTo(value, decimalsOf(value, options));
  const text = signOf(rounded, options) + numberText(Math.abs(rounded), Math.max(0, decimalsOf(value, options)));
  return options.unit ? `${text}${NARROW_SPACE}${options.unit}` : text;
}

function decimalsOf(value: number, { uncertainty, significant }: FigureOptions): number {
  if (uncertainty && Number.isFinite(uncertainty)) return 1 - Math.floor(Math.log10(Math.abs(uncertainty)));
  if (Number.isInteger(value)) return 0;
  const magnitude = Math.floor(Math.log10(Math.abs(value)));
  return Math.max(0, (significant ?? DEFAULT_SIGNIFICANT) - 1 - magnitude);
}

/** Number#toFixed stops at 100 decimals; a double has no more than 17 digits that count. */
const MOST_DECIMALS = 17;

function roundTo(value: number, decimals: number): number {
  if (decimals >= 0) return Number(value.toFixed(Math.min(decimals, MOST_DECIMALS)));
  const step = 10 ** -decimals;
  return Math.round(value / step) * step;
}

function numberText(value: number, decimals: number): string {
  const digits = Math.min(decimals, MOST_DECIMALS);
  return value.toLocaleString('en-GB', { minimumFractionDigits: digits, maximumFractionDigits: digits });
}

function signOf(value: number, { signed }: FigureOptions): string {
  if (value < 0) return MINUS;
  return signed && value > 0 ? '+' : '';
}

/** A count: whole, with thousands marked. */
export function formatCount(count: number): string {
  return count.toLocaleString('en-GB', { maximumFractionDigits: 0 });
}

/** `1 row`, `2,391 rows`. */
export function countOf(count: number, one: string, many = `${one}s`): string {
  return `${formatCount(count)} ${count === 1 ? one : many}`;
}

/** A share as a percentage: whole, but never rounded to 0 % or 100 % when it is neither. */
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
