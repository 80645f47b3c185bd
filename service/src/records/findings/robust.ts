/** The q-quantile of sorted values by linear interpolation (Hyndman and Fan 1996, definition 7). */
export function quantile(sorted: Float64Array, q: number): number {
  const at = (sorted.length - 1) * q;
  const below = Math.floor(at);
  const above = Math.min(sorted.length - 1, below + 1);
  return sorted[below] + (sorted[above] - sorted[below]) * (at - below);
}

export const sortedPresent = (values: Float64Array): Float64Array => values.filter((value) => value === value).sort();

export const median = (values: Float64Array): number => {
  const sorted = sortedPresent(values);
  return sorted.length === 0 ? NaN : quantile(sorted, 0.5);
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

/** Moments over the rows where both are present and `use` holds; one pass of updates (Welford 1962), so that large offsets do not cancel. */
export function pairMoments(x: Float64Array, y: Float64Array, use?: Uint8Array): PairMoments {
  let [count, meanX, meanY, squaresX, squaresY, products] = [0, 0, 0, 0, 0, 0];
  for (let row = 0; row < x.length; row++) {
    if (use && use[row] === 0) continue;
    const [a, b] = [x[row], y[row]];
    if (a !== a || b !== b) continue;
    count++;
    const fromX = a - meanX;
    const fromY = b - meanY;
    meanX += fromX / count;
    meanY += fromY / count;
    squaresX += fromX * (a - meanX);
    squaresY += fromY * (b - meanY);
    products += fromX * (b - meanY);
  }
  const [sdX, sdY] = [Math.sqrt(squaresX / count), Math.sqrt(squaresY / count)];
  const covariance = products / count;
  const correlation = sdX > 0 && sdY > 0 ? covariance / (sdX * sdY) : NaN;
  return { count, meanX, meanY, sdX, sdY, covariance, correlation };
}
