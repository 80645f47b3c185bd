/**
 * Natural cubic spline in the truncated-power form of Harrell (Regression Modeling Strategies, 2nd ed. 2015, eq. 2.25):
 * k knots give k − 1 columns: x itself and, for j = 1 … k−2,
 *   [ (x−t_j)₊³ − (x−t_{k−1})₊³ (t_k−t_j)/(t_k−t_{k−1}) + (x−t_k)₊³ (t_{k−1}−t_j)/(t_k−t_{k−1}) ] / (t_k − t_1)²
 * linear below the first and above the last knot.
 */
export function splineColumns(reading: number, knots: readonly number[]): number[] {
  const last = knots[knots.length - 1];
  const nextToLast = knots[knots.length - 2];
  const width = last - nextToLast;
  const norm = (last - knots[0]) ** 2;
  const columns = [reading];
  for (let j = 0; j < knots.length - 2; j += 1) {
    const bend =
      cubedAbove(reading, knots[j]) -
      (cubedAbove(reading, nextToLast) * (last - knots[j])) / width +
      (cubedAbove(reading, last) * (nextToLast - knots[j])) / width;
    columns.push(bend / norm);
  }
  return columns;
}

function cubedAbove(reading: number, knot: number): number {
  const above = reading - knot;
  return above > 0 ? above * above * above : 0;
}

/** Harrell's outer quantiles (table 2.3): 10 % for 3 knots, 5 % for 4 to 6, 2.5 % for 7; the others evenly between. */
function knotQuantiles(count: number): number[] {
  const outer = count === 3 ? 0.1 : count >= 7 ? 0.025 : 0.05;
  return Array.from({ length: count }, (_, index) => outer + ((1 - 2 * outer) * index) / (count - 1));
}

/** Knots at quantiles of the readings (missing ones excluded); equal ones are merged, so fewer may come back. Empty: no spline possible. */
export function placeKnots(readings: Float64Array, count: number): number[] {
  const sorted = readings.filter((reading) => !Number.isNaN(reading)).sort();
  const knots = knotQuantiles(count).map((share) => quantile(sorted, share));
  const distinct = knots.filter((knot, index) => index === 0 || knot > knots[index - 1]);
  return distinct.length >= 3 ? distinct : [];
}

/** Quantile of ascending values by linear interpolation (type 7 of Hyndman and Fan 1996). */
export function quantile(sorted: Float64Array, share: number): number {
  const place = (sorted.length - 1) * share;
  const below = Math.floor(place);
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below] + (place - below) * (sorted[above] - sorted[below]);
}
