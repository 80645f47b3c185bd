/** What was made of a typed number. */
export type NumberReading = { readonly value: number } | { readonly problem: string } | { readonly empty: true };

const plain = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d+)?$/i;
const grouped = /^[+-]?\d{1,3}([ ,]\d{3})+(\.\d+)?$/;
const decimalComma = /^[+-]?\d+,\d+$/;

/**
 * Reads a number as people type it: spaces and thousands commas are passed over, a decimal comma is understood where it
 * can be nothing else, and a text that could mean two numbers is asked about rather than guessed.
 */
export function readNumber(text: string): NumberReading {
  const tidy = text.replace(/[\u00a0\u2009\u202f]/g, ' ').replace(/\u2212/g, '-').trim();
  if (tidy === '') return { empty: true };
  if (/^[+-]?\d{1,3},\d{3}$/.test(tidy)) {
    return { problem: `“${tidy}” could be two numbers. Write ${tidy.replace(',', '')} or ${tidy.replace(',', '.')}.` };
  }
  if (plain.test(tidy)) return finite(Number(tidy), tidy);
  if (grouped.test(tidy)) return finite(Number(tidy.replace(/[ ,]/g, '')), tidy);
  if (decimalComma.test(tidy)) return finite(Number(tidy.replace(',', '.')), tidy);
  return { problem: `“${tidy}” is not a number. Write it like 12.5.` };
}

function finite(value: number, text: string): NumberReading {
  return Number.isFinite(value) ? { value } : { problem: `“${text}” is too large a number.` };
}
