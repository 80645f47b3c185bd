/**
 * How a cell reads as a number. "Point" and "comma" name the decimal mark. `1.234` alone does not tell whether it
 * is a decimal or a grouped thousand, nor does `1,234`; the column, or the file, must.
 */
export const NumberClass = {
  none: 0,
  integer: 1,
  point: 2,
  /** `1.234`: a decimal under point, 1234 under comma. */
  pointOrGroup: 3,
  comma: 4,
  /** `1,234`: a decimal under comma, 1234 under point. */
  commaOrGroup: 5,
} as const;
export type NumberClass = (typeof NumberClass)[keyof typeof NumberClass];

export type DecimalMark = '.' | ',';

const powersOfTen = Float64Array.from({ length: 23 }, (_, power) => 10 ** power);
const codeOf = (text: string): number => text.charCodeAt(0);
const zero = codeOf('0');
const point = codeOf('.');
const comma = codeOf(',');
const plus = codeOf('+');
const minus = codeOf('-');

const exponent = /^[+-]?(?:\d+[.,]?\d*|[.,]\d+)[eE][+-]?\d{1,3}$/;
const spaceGroups = /^[+-]?[1-9]\d{0,2}(?:[ \u00a0\u2009\u202f'’]\d{3})+([.,]\d+)?$/;
const commaGroups = /^[+-]?[1-9]\d{0,2}(?:(?:,\d{3})+\.\d+|(?:,\d{3}){2,})$/;
const pointGroups = /^[+-]?[1-9]\d{0,2}(?:(?:\.\d{3})+,\d+|(?:\.\d{3}){2,})$/;
const plainLong = /^[+-]?(?:0|[1-9]\d*)?(?:[.,]\d*)?$/;

/**
 * Reads cells one after another without making an object for each: `read` answers the class and leaves the value
 * under either decimal mark in `pointValue` and `commaValue`.
 */
export class NumberReader {
  pointValue = NaN;
  commaValue = NaN;

  /**
   * Up to fifteen digits are gathered as a whole number m with f digits after the mark. m < 2^53 and 10^f (f ≤ 22)
   * are exact, so m / 10^f is the correctly rounded value (Clinger 1990, "How to read floating point numbers
   * accurately", the fast path). Everything else goes the long way round.
   */
  read(text: string): NumberClass {
    const length = text.length;
    let at = 0;
    const first = text.charCodeAt(0);
    const negative = first === minus;
    if (negative || first === plus) at = 1;
    const start = at;
    let mantissa = 0;
    let mark = 0;
    let markAt = length;
    for (; at < length; at++) {
      const digit = text.charCodeAt(at) - zero;
      if (digit >= 0 && digit <= 9) mantissa = mantissa * 10 + digit;
      else if (mark === 0 && (digit === point - zero || digit === comma - zero)) {
        mark = digit + zero;
        markAt = at;
      } else return this.readUnusual(text);
    }
    const whole = markAt - start;
    const decimals = mark === 0 ? 0 : length - markAt - 1;
    const digits = whole + decimals;
    if (digits === 0 || digits > 15) return this.readUnusual(text);
    const leadingZero = text.charCodeAt(start) === zero;
    // A code such as 00123, not a quantity.
    if (leadingZero && whole > 1 && mark === 0) return NumberClass.none;
    const signed = negative ? -mantissa : mantissa;
    const value = signed / powersOfTen[decimals];
    if (mark === 0) return this.both(value);
    const grouped = decimals === 3 && whole > 0 && whole < 4 && !leadingZero ? signed : NaN;
    return mark === point ? this.pointed(value, grouped) : this.commaed(value, grouped);
  }

  private both(value: number): NumberClass {
    this.pointValue = value;
    this.commaValue = value;
    return NumberClass.integer;
  }

  private pointed(value: number, grouped: number): NumberClass {
    this.pointValue = value;
    this.commaValue = grouped;
    return grouped === grouped ? NumberClass.pointOrGroup : NumberClass.point;
  }

  private commaed(value: number, grouped: number): NumberClass {
    this.commaValue = value;
    this.pointValue = grouped;
    return grouped === grouped ? NumberClass.commaOrGroup : NumberClass.comma;
  }

  private readUnusual(given: string): NumberClass {
    const text = given.trim().replace('\u2212', '-');
    if (text.length === 0 || text.length > 60) return NumberClass.none;
    return text === given ? this.readUnusualTrimmed(text) : this.read(text);
  }

  private readUnusualTrimmed(text: string): NumberClass {
    const grouped = spaceGroups.exec(text);
    if (grouped) {
      const value = Number(text.replace(/[^\d.,+-]/g, '').replace(',', '.'));
      if (grouped[1] === undefined) return this.both(value);
      return grouped[1][0] === '.' ? this.pointed(value, NaN) : this.commaed(value, NaN);
    }
    if (commaGroups.test(text)) return this.pointed(Number(text.replaceAll(',', '')), NaN);
    if (pointGroups.test(text)) return this.commaed(Number(text.replaceAll('.', '').replace(',', '.')), NaN);
    if (!/\d/.test(text) || !(exponent.test(text) || plainLong.test(text))) return NumberClass.none;
    const value = Number(text.replace(',', '.'));
    if (!Number.isFinite(value)) return NumberClass.none;
    if (text.includes(',')) return this.commaed(value, NaN);
    return text.includes('.') ? this.pointed(value, NaN) : this.both(value);
  }
}
