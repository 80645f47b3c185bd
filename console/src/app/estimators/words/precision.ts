/**
 * Digits follow from how far a figure may be off: two significant digits of the spread, and the figure rounded to match
 * (JCGM 100:2008, 7.2.6). Nothing here invents a digit that the spread does not earn.
 */

/** The place value of the second significant digit of `spread`: 75 → 1, 150 → 10, 0.34 → 0.01. */
export function stepOf(spread: number): number {
  if (!Number.isFinite(spread) || spread <= 0) return 0;
  return 10 ** (Math.floor(Math.log10(spread)) - 1);
}

/** Rounds to a multiple of `step`; a step of 0 leaves the figure alone. */
export function roundTo(value: number, step: number): number {
  return step > 0 ? Math.round(value / step) * step : value;
}

/** Decimals that show a multiple of `step` in full; at most 12. */
export function decimalsOf(step: number): number {
  if (!(step > 0)) return 3;
  return Math.min(12, Math.max(0, -Math.floor(Math.log10(step) + 1e-9)));
}

/** A figure to a step, with thousands separated and a true minus sign. */
export function figureToStep(value: number, step: number): string {
  const decimals = decimalsOf(step);
  const rounded = roundTo(value, step);
  return trueMinus(
    (Object.is(rounded, -0) ? 0 : rounded).toLocaleString('en-GB', {
      minimumFractionDigits: decimals,
      maximumFractionDigits: decimals,
    }),
  );
}

/** A figure to so many significant digits, in plain notation between 0.0001 and ten million, else in powers of ten. */
export function significant(value: number, digits = 3): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e7 || size < 1e-4) return trueMinus(value.toExponential(digits - 1).replace('e+', 'e'));
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(size)));
  return trueMinus(value.toLocaleString('en-GB', { minimumFractionDigits: Math.min(decimals, 12), maximumFractionDigits: Math.min(decimals, 12) }));
}

/** A figure that somebody typed: every digit of it, thousands separated. */
export function exact(value: number): string {
  return trueMinus(value.toLocaleString('en-GB', { maximumSignificantDigits: 15 }));
}

/** The same with its sign always written. */
export function signed(text: string): string {
  return text.startsWith('−') || /^[0.,]*$/.test(text) ? text : `+${text}`;
}

export function percent(share: number, decimals = 0): string {
  return `${(share * 100).toFixed(decimals)} %`;
}

export function count(value: number): string {
  return value.toLocaleString('en-GB');
}

/** A figure with its unit, or alone when there is no unit. */
export function withUnit(text: string, unit: string | null | undefined): string {
  return unit ? `${text}\u00a0${unit}` : text;
}

function trueMinus(text: string): string {
  return text.replace('-', '−').replace('e-', 'e−');
}
