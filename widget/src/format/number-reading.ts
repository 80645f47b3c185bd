import { knownLocale } from './number-format';
import { isSameUnit } from './unit-words';

export type NumberReading =
  | { readonly ok: true; readonly value: number }
  | { readonly ok: false; readonly reason: 'empty' | 'not-a-number' }
  | { readonly ok: false; readonly reason: 'other-unit'; readonly typedUnit: string }
  /** `asWhole` and `asDecimal` are the two readings, each written so that it is accepted when typed. */
  | { readonly ok: false; readonly reason: 'ambiguous'; readonly asWhole: string; readonly asDecimal: string };

export interface ReadingOptions {
  readonly unit?: string | null;
  /** Whose decimal separator counts as decimal before three digits ("1.234" in English); without it such a number is refused. */
  readonly locale?: string | null;
}

const BODY = /^([+\-−–]?)\s*((?:[.,]?\d)(?:[\d.,]|['’\s](?=\d))*)\s*(.*)$/su;
type DecimalSeparator = ',' | '.';

/**
 * Reads a number that a person typed. A number field of the browser is no use here: it hands over an empty string for
 * anything it cannot read, and which separator it accepts depends on the browser's language.
 */
export function readNumber(text: string, { unit, locale }: ReadingOptions = {}): NumberReading {
  const cleaned = withoutLeadingUnit(
    text
      .normalize('NFKC')
      .replace(/\p{Cf}/gu, '')
      .trim(),
    unit,
  );
  if (cleaned === '') {
    return { ok: false, reason: 'empty' };
  }
  const parts = BODY.exec(cleaned);
  if (!parts) {
    return { ok: false, reason: 'not-a-number' };
  }
  const [, sign, body, rest] = parts;
  const reading = readBody(sign === '' || sign === '+' ? 1 : -1, body, locale);
  if (rest !== '' && !(unit && isSameUnit(rest, unit))) {
    return /^[\d.,]/.test(rest)
      ? { ok: false, reason: 'not-a-number' }
      : { ok: false, reason: 'other-unit', typedUnit: rest };
  }
  return reading;
}

/** The character that a language writes before decimals. */
export function decimalSeparatorOf(locale: string | null | undefined): string | null {
  const known = knownLocale(locale);
  return known
    ? (new Intl.NumberFormat(known).formatToParts(1.5).find((part) => part.type === 'decimal')?.value ?? null)
    : null;
}

function readBody(sign: 1 | -1, body: string, locale: string | null | undefined): NumberReading {
  const whole = wholeReading(body);
  const decimal = decimalReading(body);
  if (whole !== null && decimal !== null && whole.value !== decimal.value) {
    return decimal.separator === decimalSeparatorOf(locale)
      ? finite(sign * decimal.value)
      : { ok: false, reason: 'ambiguous', ...bothForms({ sign, body, separator: decimal.separator, locale }) };
  }
  const value = whole?.value ?? decimal?.value;
  return value === undefined ? { ok: false, reason: 'not-a-number' } : finite(sign * value);
}

/** Plain digits, or digits in groups of three with one and the same separator. */
function wholeReading(body: string): { readonly value: number } | null {
  const grouped = /^[1-9]\d{0,2}([.,'’\s])\d{3}(?:\1\d{3})*$/u.test(body);
  return grouped || /^\d+$/.test(body) ? { value: Number(body.replace(/\D/g, '')) } : null;
}

/** One comma or point before the decimals; the whole part may be grouped with another separator. */
function decimalReading(body: string): { readonly value: number; readonly separator: DecimalSeparator } | null {
  const parts = /^(.*)([.,])(\d*)$/su.exec(body);
  if (!parts || (parts[1] === '' && parts[3] === '')) {
    return null;
  }
  const separator: DecimalSeparator = parts[2] === ',' ? ',' : '.';
  const whole = parts[1] === '' ? { value: 0 } : parts[1].includes(separator) ? null : wholeReading(parts[1]);
  return whole && { value: Number(`${whole.value}.${parts[3] || '0'}`), separator };
}

interface Ambiguous {
  readonly sign: 1 | -1;
  readonly body: string;
  readonly separator: DecimalSeparator;
  readonly locale: string | null | undefined;
}

/** With the language's own separator three decimals are clear; without a language a fourth digit makes them so. */
function bothForms({ sign, body, separator, locale }: Ambiguous): { asWhole: string; asDecimal: string } {
  const minus = sign === -1 ? '-' : '';
  const [before, after] = body.split(separator);
  const own = decimalSeparatorOf(locale);
  const decimals = own ? `${own}${after}` : `${separator}${after}0`;
  return { asWhole: `${minus}${before}${after}`, asDecimal: `${minus}${before}${decimals}` };
}

function finite(value: number): NumberReading {
  return Number.isFinite(value) ? { ok: true, value: value === 0 ? 0 : value } : { ok: false, reason: 'not-a-number' };
}

function withoutLeadingUnit(text: string, unit: string | null | undefined): string {
  const lead = /^[^\d.,+\-−–]+/u.exec(text)?.[0];
  return lead && unit && isSameUnit(lead, unit) ? text.slice(lead.length).trim() : text;
}
