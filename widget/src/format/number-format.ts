import { decimalsOf, roundTo } from './precision';

const MINUS = '\u2212';
const NARROW_SPACE = '\u202f';

export function formatStepped(value: number, step: number, locale?: string): string {
  return format(roundTo(value, step), locale, fixedDecimals(decimalsOf(step)));
}

/** With its sign written, save for nought. */
export function formatSigned(value: number, step: number, locale?: string): string {
  return format(roundTo(value, step), locale, { ...fixedDecimals(decimalsOf(step)), signDisplay: 'exceptZero' });
}

/** "× 1.18"; three significant digits, two decimals at most. */
export function formatFactor(factor: number, locale?: string): string {
  const step = factor >= 100 ? 1 : factor >= 10 ? 0.1 : factor >= 0.1 ? 0.01 : 0.001;
  return `×${NARROW_SPACE}${formatStepped(factor, step, locale)}`;
}

/** A reading given with a case: as it was typed, so a year has no separator and no digit is added. */
export function formatReading(value: number, locale?: string): string {
  return format(value, locale, { maximumSignificantDigits: 7, useGrouping: Math.abs(value) >= 10_000 });
}

export function withUnit(figure: string, unit: string | null | undefined): string {
  if (!unit) {
    return figure;
  }
  return unit === '%' || unit === '°' ? `${figure}${unit}` : `${figure}\u00a0${unit}`;
}

function fixedDecimals(decimals: number): Intl.NumberFormatOptions {
  return { minimumFractionDigits: decimals, maximumFractionDigits: decimals };
}

/** Intl writes a hyphen where a minus sign belongs. */
function format(value: number, locale: string | undefined, options: Intl.NumberFormatOptions): string {
  return new Intl.NumberFormat(knownLocale(locale), options)
    .formatToParts(value)
    .map((part) => (part.type === 'minusSign' ? MINUS : part.value))
    .join('');
}

/** A page may declare a language tag that is none; the browser's own then serves. */
export function knownLocale(locale: string | null | undefined): string | undefined {
  if (!locale) {
    return undefined;
  }
  try {
    return Intl.NumberFormat.supportedLocalesOf(locale)[0];
  } catch (error) {
    if (error instanceof RangeError) {
      return undefined;
    }
    throw error;
  }
}
