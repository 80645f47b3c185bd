/** A figure that somebody typed: every digit of it, thousands separated, with a true minus sign. */
export function exact(value: number): string {
  return value.toLocaleString('en-GB', { maximumSignificantDigits: 15 }).replace('-', '\u2212');
}
