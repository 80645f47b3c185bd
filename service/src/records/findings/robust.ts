import { quantileOf } from '../reading/sorted-figures';

export const sortedPresent = (values: Float64Array): Float64Array => values.filter((value) => value === value).sort();

export const median = (values: Float64Array): number => {
  const sorted = sortedPresent(values);
  return sorted.length === 0 ? NaN : quantileOf(sorted, 0.5);
};

/**
 * Median absolute deviation × 1.4826, which estimates the standard deviation of normal readings (Hampel 1974,
 * "The influence curve and its role in robust estimation").
 */
export const robustDeviation = (values: Float64Array, centre: number): number =>
  1.4826 * median(values.map((value) => Math.abs(value - centre)));

export interface PairMoments {
  readonly count: number;
  readonly meanX: number;
  readonly meanY: number;
  readonly sdX: number;
  readonly sdY: number;
  readonly covariance: number;
  readonly correlation: number;
}

/** The first row where both are present and `use` holds; −1 when there is none. */
function firstPair(x: Float64Array, y: Float64Array, use?: Uint8Array): number {
  for (let row = 0; row < x.length; row++)
    if (x[row] === x[row] && y[row] === y[row] && (!use || use[row] === 1)) return row;
  return -1;
}

/**
 * Moments over the rows where both are present and `use` holds. One pass of sums of distances d from the first
 * reading: S = Σdxdy − ΣdxΣdy / n (Chan, Golub, LeVeque 1983, "Algorithms for computing the sample variance", section
 * 3, shifted data). As the shift is itself a reading, (mean − shift)² is n times the variance at most, so what cancels
 * is no more than n roundings of 10⁻¹⁶ however large the readings are; a column that does not vary gives exactly 0.
 */
export function pairMoments(x: Float64Array, y: Float64Array, use?: Uint8Array): PairMoments {
  const first = Math.max(0, firstPair(x, y, use));
  const baseX = x[first];
  const baseY = y[first];
  let count = 0;
  let sumX = 0;
  let sumY = 0;
  let squaresX = 0;
  let squaresY = 0;
  let products = 0;
  for (let row = first; row < x.length; row++) {
    const dx = x[row] - baseX;
    const dy = y[row] - baseY;
    if (dx !== dx || dy !== dy || (use && use[row] === 0)) continue;
    count++;
    sumX += dx;
    sumY += dy;
    squaresX += dx * dx;
    squaresY += dy * dy;
    products += dx * dy;
  }
  const sdX = Math.sqrt(Math.max(0, squaresX - (sumX * sumX) / count) / count);
  const sdY = Math.sqrt(Math.max(0, squaresY - (sumY * sumY) / count) / count);
  const covariance = (products - (sumX * sumY) / count) / count;
  const correlation = sdX > 0 && sdY > 0 ? covariance / sdX / sdY : NaN;
  return { count, meanX: baseX + sumX / count, meanY: baseY + sumY / count, sdX, sdY, covariance, correlation };
}
