import { readNumber } from '@widget/format/number-reading';

/** What was made of a typed number. */
export type TypedNumber = { readonly value: number } | { readonly problem: string } | { readonly empty: true };

const scientific = /^[+-]?(\d+(\.\d*)?|\.\d+)e[+-]?\d+$/i;

/** Reads a number as the forms of partners do, and powers of ten as well: penalties are often written so. */
export function typedNumber(text: string, unit?: string): TypedNumber {
  const tidy = text.trim().replace(/\u2212/g, '-');
  if (scientific.test(tidy) && Number.isFinite(Number(tidy))) return { value: Number(tidy) };
  const reading = readNumber(text, { unit, locale: 'en-GB' });
  if (reading.ok) return { value: reading.value };
  switch (reading.reason) {
    case 'empty':
      return { empty: true };
    case 'ambiguous':
      return { problem: `“${tidy}” could be two numbers. Write ${reading.asWhole} or ${reading.asDecimal}.` };
    case 'other-unit':
      return {
        problem: `“${reading.typedUnit}” is not the unit here. Write ${unit ? `the number in ${unit}` : 'the number alone'}.`,
      };
    case 'not-a-number':
      return { problem: `“${tidy}” is not a number. Write it like 12.5.` };
  }
}
