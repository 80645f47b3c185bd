import { histogramOf, type Histogram } from './histogram';
import { maximumDistinct } from './limits';
import type { ReadingSorter } from './reading-sorter';
import { distinctOf, outlyingOf, quantilesOf } from './sorted-figures';

/** What `record_columns` holds about a column beside its name and kind. */
export interface ColumnStatistics {
  readonly missingCount: number;
  readonly distinctCount: number | null;
  readonly minimum: number | null;
  readonly maximum: number | null;
  readonly mean: number | null;
  readonly standardDeviation: number | null;
  readonly quantiles: readonly Quantile[] | null;
  readonly outlying: Outlying | null;
  readonly histogram: Histogram | null;
}

export interface Quantile {
  readonly share: number;
  readonly value: number;
}

/** Readings further from the median than five scaled median absolute deviations: below `low` or above `high`. */
export interface Outlying {
  readonly count: number;
  readonly low: number;
  readonly high: number;
  /** Median absolute deviation × 1.4826. */
  readonly deviation: number;
}

const nothing: ColumnStatistics = {
  missingCount: 0,
  distinctCount: 0,
  minimum: null,
  maximum: null,
  mean: null,
  standardDeviation: null,
  quantiles: null,
  outlying: null,
  histogram: null,
};

export const statisticsOfLevels = (missingCount: number, distinctCount: number | null): ColumnStatistics => ({
  ...nothing,
  missingCount,
  distinctCount,
});

/** Sums of the very largest numbers overflow; then there is no figure to give. */
const finite = (value: number): number | null => (Number.isFinite(value) ? value : null);

/** What sums of a column give; NaN is missing. */
interface Moments {
  readonly count: number;
  readonly minimum: number;
  readonly maximum: number;
  readonly mean: number | null;
  readonly standardDeviation: number | null;
}

/**
 * Of n readings: mean = Σx / n and standard deviation = √(Σ(x − mean)² / n), in two passes, the second corrected by
 * the sum of the deviations (Chan, Golub, LeVeque 1983, "Algorithms for computing the sample variance", eq. 1.7).
 */
function momentsOf(values: Float64Array): Moments {
  let [count, sum, minimum, maximum] = [0, 0, Infinity, -Infinity];
  for (let row = 0; row < values.length; row++) {
    const value = values[row];
    if (value !== value) continue;
    count++;
    sum += value;
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
  }
  const mean = sum / count;
  let [squares, deviations] = [0, 0];
  for (let row = 0; row < values.length; row++) {
    const value = values[row];
    if (value !== value) continue;
    squares += (value - mean) * (value - mean);
    deviations += value - mean;
  }
  const standardDeviation = Math.sqrt(Math.max(0, squares - (deviations * deviations) / count) / count);
  return {
    ...{ count, minimum, maximum },
    mean: finite(mean + deviations / count),
    standardDeviation: finite(standardDeviation),
  };
}

/** Of a numeric or date column; NaN is missing. Cost: a few passes and one linear sort. */
export function statisticsOf(kind: 'numeric' | 'date', values: Float64Array, sorter: ReadingSorter): ColumnStatistics {
  const { count, ...moments } = momentsOf(values);
  const missingCount = values.length - count;
  if (count === 0) return { ...nothing, missingCount };
  const sorted = sorter.sort(values);
  return {
    missingCount,
    distinctCount: distinctOf(sorted, maximumDistinct),
    ...moments,
    quantiles: quantilesOf(sorted),
    outlying: kind === 'numeric' ? outlyingOf(sorted) : null,
    histogram: histogramOf(values, moments.minimum, moments.maximum),
  };
}
