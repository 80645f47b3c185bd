/** Quantiles of Student's t, from the regularised incomplete beta function (continued fraction, DLMF 8.17.22). */

/** Two-sided: P(|T| ≤ q) = level. Degrees may be any number above 0; beyond 1e7 the normal limit is reached in double precision. */
export function studentQuantile(level: number, degrees: number): number {
  let low = 0;
  let high = 1;
  while (within(high, degrees) < level && high < 1e8) high *= 2;
  for (let round = 0; round < 200 && high - low > 1e-15 * high; round += 1) {
    const middle = (low + high) / 2;
    if (within(middle, degrees) < level) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** P(|T| ≤ t) = 1 − I_x(ν/2, ½), x = ν/(ν + t²). */
function within(t: number, degrees: number): number {
  const bounded = Math.min(degrees, 1e7);
  return 1 - incompleteBeta(bounded / (bounded + t * t), bounded / 2, 0.5);
}

export function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  return x < (a + 1) / (a + b + 2)
    ? (front * continuedFraction(x, a, b)) / a
    : 1 - (front * continuedFraction(1 - x, b, a)) / b;
}

/** Modified Lentz (Press et al., Numerical Recipes, section 6.4). */
function continuedFraction(x: number, a: number, b: number): number {
  const guard = (value: number): number => (Math.abs(value) < 1e-300 ? 1e-300 : value);
  let c = 1;
  let d = 1 / guard(1 - ((a + b) * x) / (a + 1));
  let fraction = d;
  for (let m = 1; m <= 10000; m += 1) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / guard(1 + even * d);
    c = guard(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / guard(1 + odd * d);
    c = guard(1 + odd / c);
    fraction *= d * c;
    if (Math.abs(d * c - 1) < 1e-15) break;
  }
  return fraction;
}

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
];

/** ln Γ (Lanczos 1964, g = 7, nine terms). */
export function logGamma(value: number): number {
  const shifted = value - 1;
  const base = shifted + 7.5;
  const series = LANCZOS.reduce((sum, term, index) => (index === 0 ? term : sum + term / (shifted + index)), 0);
  return 0.5 * Math.log(2 * Math.PI) + (shifted + 0.5) * Math.log(base) - base + Math.log(series);
}
