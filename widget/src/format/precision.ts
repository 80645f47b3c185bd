/**
 * How far a figure may be rounded. The half-width of the interval carries at most two significant digits and the
 * estimate is rounded to match (the rule of GUM, JCGM 100:2008, section 7.2.6).
 */
export interface Precision {
  /** The estimate, the typical value and contributions are multiples of this. */
  readonly step: number;
  /** The ends of the interval are multiples of this: 1, 2 or 5 times a power of ten, at most a seventh of the half-width. */
  readonly endStep: number;
}

export interface MeasuredValue {
  readonly value: number;
  readonly low: number | null;
  readonly high: number | null;
}

const SIGNIFICANT_DIGITS_WITHOUT_INTERVAL = 3;

export function precisionFor({ value, low, high }: MeasuredValue): Precision {
  const halfWidth = halfWidthOf(value, low, high);
  if (halfWidth === null) {
    const step = value === 0 ? 1 : powerOfTen(exponentOf(Math.abs(value)) - SIGNIFICANT_DIGITS_WITHOUT_INTERVAL + 1);
    return { step, endStep: step };
  }
  const step = powerOfTen(exponentOf(halfWidth) - 1);
  return { step, endStep: Math.max(step, roundStepAtMost(halfWidth / 7)) };
}

/** Decimal places that a multiple of `step` needs. */
export function decimalsOf(step: number): number {
  return Math.max(0, -exponentOf(step));
}

export function roundTo(value: number, step: number): number {
  const rounded = step < 1 ? Math.round(value / step) / Math.round(1 / step) : Math.round(value / step) * step;
  return rounded === 0 ? 0 : rounded;
}

function halfWidthOf(value: number, low: number | null, high: number | null): number | null {
  if (low !== null && high !== null && high > low) {
    return (high - low) / 2;
  }
  const end = low ?? high;
  return end !== null && end !== value ? Math.abs(end - value) : null;
}

/** Largest of 1, 2 and 5 times a power of ten that does not exceed `limit`. */
function roundStepAtMost(limit: number): number {
  const base = powerOfTen(exponentOf(limit));
  const factor = [5, 2, 1].find((candidate) => candidate * base <= limit * (1 + 1e-9)) ?? 1;
  return factor * base;
}

/** log10 of a power of ten can fall just short of a whole number (log10(1000) in some engines). */
function exponentOf(value: number): number {
  return Math.floor(Math.log10(value) + 1e-12);
}

function powerOfTen(exponent: number): number {
  return Number(`1e${exponent}`);
}
