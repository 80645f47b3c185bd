const zero = 48;
const nine = 57;
const hyphen = 45;
/** Days of a year of 365 days before each month. */
const daysBefore = [0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334] as const;
const daysIn = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
/** Days from year 0 to 1970. */
const daysTo1970 = 719_528;

const isLeap = (year: number): boolean => year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);

/** Two digits at a place of the text, or NaN. */
function twoDigits(text: string, at: number): number {
  const tens = text.charCodeAt(at);
  const ones = text.charCodeAt(at + 1);
  return tens >= zero && tens <= nine && ones >= zero && ones <= nine ? tens * 10 + ones - 11 * zero : NaN;
}

/**
 * Days since 1970-01-01 of a date written exactly `2026-03-01`, by far the most frequent way; NaN for anything else,
 * which the long way of reading may still know. By arithmetic on the Gregorian calendar, since a look-up of every cell
 * among the dates known so far costs ten times as much.
 */
export function plainDays(text: string): number {
  if (text.length !== 10 || text.charCodeAt(4) !== hyphen || text.charCodeAt(7) !== hyphen) return NaN;
  const year = twoDigits(text, 0) * 100 + twoDigits(text, 2);
  const month = twoDigits(text, 5);
  const day = twoDigits(text, 8);
  if (!(year >= 1000 && month >= 1 && month <= 12 && day >= 1)) return NaN;
  const leap = isLeap(year);
  if (day > daysIn[month - 1] + (leap && month === 2 ? 1 : 0)) return NaN;
  const before = year - 1;
  const leapDays = Math.floor(before / 4) - Math.floor(before / 100) + Math.floor(before / 400) + 1;
  return year * 365 + leapDays - daysTo1970 + daysBefore[month - 1] + (leap && month > 2 ? 1 : 0) + day - 1;
}
