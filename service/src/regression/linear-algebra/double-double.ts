/**
 * Sums of products in twice the working precision: products are split without error (Dekker 1971), sums carry their
 * rounding (Knuth's two-sum; Ogita, Rump and Oishi 2005, "Accurate sum and dot product", algorithm 5.3).
 */
const SPLITTER = 134217729; // 2^27 + 1

export class LongSum {
  private high = 0;
  private low = 0;

  add(value: number): void {
    const sum = this.high + value;
    const part = sum - this.high;
    this.low += this.high - (sum - part) + (value - part);
    this.high = sum;
  }

  addProduct(first: number, second: number): void {
    const product = first * second;
    const a = splitHigh(first);
    const b = splitHigh(second);
    const aLow = first - a;
    const bLow = second - b;
    this.add(product);
    this.low += aLow * bLow - (product - a * b - aLow * b - a * bLow);
  }

  value(): number {
    return this.high + this.low;
  }
}

function splitHigh(value: number): number {
  const scaled = SPLITTER * value;
  return scaled - (scaled - value);
}
