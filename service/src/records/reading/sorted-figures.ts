import type { Outlying, Quantile } from './column-statistics';

/** Shares at which quantiles are given. */
const quantileShares = [0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99] as const;

/** So many scaled median absolute deviations from the median a reading counts as outlying (common practice, no source). */
const outlyingDeviations = 5;

/** With fewer readings their spread says too little to call one of them outlying (ours; no source). */
const enoughReadings = 20;

/** How many different numbers stand in ascending readings; null above the limit. */
export function distinctOf(sorted: Float64Array, limit: number): number | null {
  let distinct = sorted.length > 0 ? 1 : 0;
  for (let at = 1; at < sorted.length; at++) if (sorted[at] !== sorted[at - 1]) distinct++;
  return distinct > limit ? null : distinct;
}

/**
 * The quantile of ascending readings x₀ … xₙ₋₁ (n ≥ 1) at a share p: with h = (n − 1) p, linear between x⌊h⌋ and the
 * one above it (Hyndman and Fan 1996, "Sample quantiles in statistical packages", definition 7).
 */
export function quantileOf(sorted: Float64Array, share: number): number {
  const at = (sorted.length - 1) * share;
  const below = Math.floor(at);
  const [low, high] = [sorted[below], sorted[Math.min(sorted.length - 1, below + 1)]];
  const part = at - below;
  // Not low + (high − low) · part, whose difference may overflow; held between the two against rounding.
  return low === high ? low : Math.min(high, Math.max(low, (1 - part) * low + part * high));
}

export const quantilesOf = (sorted: Float64Array): Quantile[] =>
  quantileShares.map((share) => ({ share, value: quantileOf(sorted, share) }));

/** Where the first reading at or above (`orEqual`) or above the bound stands. */
function firstBeyond(sorted: Float64Array, bound: number, orEqual: boolean): number {
  let [from, to] = [0, sorted.length];
  while (from < to) {
    const middle = (from + to) >>> 1;
    if (sorted[middle] > bound || (orEqual && sorted[middle] === bound)) to = middle;
    else from = middle + 1;
  }
  return from;
}

/**
 * The median of |xᵢ − centre|, the mean of the two middle ones when n is even. Deviations grow from the centre to
 * either side, so the two sides are merged up to the middle. Cost: n / 2 steps.
 */
export function medianDeviation(sorted: Float64Array, centre: number): number {
  const { length } = sorted;
  let right = firstBeyond(sorted, centre, true);
  let left = right - 1;
  let [before, last] = [0, 0];
  for (let taken = 0; taken <= length >> 1; taken++) {
    before = last;
    const below = left >= 0 ? centre - sorted[left] : Infinity;
    const above = right < length ? sorted[right] - centre : Infinity;
    if (below < above) left--;
    else right++;
    last = Math.min(below, above);
  }
  return length % 2 === 1 ? last : (before + last) / 2;
}

/**
 * Readings further from the median than five median absolute deviations × 1.4826, the factor by which these estimate
 * the standard deviation of normal readings (Hampel 1974, "The influence curve and its role in robust estimation").
 * Null with fewer than 20 readings, and when the deviation is 0, since more than half of the readings are then equal
 * and every other one would be outlying.
 */
export function outlyingOf(sorted: Float64Array): Outlying | null {
  if (sorted.length < enoughReadings) return null;
  const centre = quantileOf(sorted, 0.5);
  const deviation = 1.4826 * medianDeviation(sorted, centre);
  const [low, high] = [centre - outlyingDeviations * deviation, centre + outlyingDeviations * deviation];
  if (deviation === 0 || !Number.isFinite(low) || !Number.isFinite(high)) return null;
  const count = firstBeyond(sorted, low, true) + sorted.length - firstBeyond(sorted, high, false);
  return { count, low, high, deviation };
}
