import type { DesignMatrix, FilledColumn } from './design-matrix';

/** Sums of products of the design's stored columns (columnCount + 2 squared, row-major) over some of the records. */
export type Moments = Float64Array;

/** What standardising needs to know of a design, without its records. */
export interface DesignShape {
  readonly columnCount: number;
  readonly filled: readonly FilledColumn[];
  readonly intercept: boolean;
  /** Centres and scales of all records: a reading is z = (x − centre)/scale. */
  readonly centres: Float64Array;
  readonly scales: Float64Array;
}

export function shapeOf(design: DesignMatrix): DesignShape {
  const { columnCount, filled, intercept, centres, scales } = design;
  return { columnCount, filled, intercept, centres, scales };
}

export function addMoments(parts: readonly Moments[]): Moments {
  const total = new Float64Array(parts[0].length);
  for (const part of parts) for (let entry = 0; entry < total.length; entry += 1) total[entry] += part[entry];
  return total;
}

/** A fold's own fill: column ← column + shift · (indicator's reading, 0 or 1). */
export interface FoldFill {
  readonly column: number;
  readonly indicator: number;
  readonly shift: number;
}

/**
 * The problem that the solvers see, on columns standardised by the training records themselves:
 * S = X̃ᵀWX̃/n, c = X̃ᵀWỹ/n, yy = ỹᵀWỹ/n. Constant columns are left out; `kept` are the design's positions of the others.
 */
export interface StandardisedProblem {
  readonly weightSum: number;
  readonly size: number;
  readonly kept: Int32Array;
  readonly gram: Float64Array;
  readonly cross: Float64Array;
  readonly targetSquare: number;
  readonly means: Float64Array;
  readonly scales: Float64Array;
  readonly targetMean: number;
  readonly fills: readonly FoldFill[];
}

/** Variance below this share of the mean square is rounding: the column is constant. */
const CONSTANT_SHARE = 1e-12;

/** `usable[column]` false leaves a column out (constant in all records, or a reference level). */
export function standardise(moments: Moments, shape: DesignShape, usable: readonly boolean[]): StandardisedProblem {
  const { columnCount: d, intercept } = shape;
  const width = d + 2;
  const weightSum = moments[d * width + d];
  const fills = foldFills(moments, shape);
  const sums = fills.length === 0 ? moments : applyFills(moments, shape, fills);
  const mean = (column: number): number => (intercept ? sums[d * width + column] / weightSum : 0);
  const covariance = (row: number, column: number): number =>
    sums[row * width + column] / weightSum - mean(row) * mean(column);
  const kept: number[] = [];
  for (let column = 0; column < d; column += 1) {
    const square = sums[column * width + column] / weightSum;
    if (usable[column] && covariance(column, column) > CONSTANT_SHARE * square) kept.push(column);
  }
  const scales = Float64Array.from(kept, (column) => Math.sqrt(covariance(column, column)));
  return {
    weightSum,
    size: kept.length,
    kept: Int32Array.from(kept),
    gram: correlations(kept, scales, covariance),
    cross: Float64Array.from(kept, (column, at) => covariance(column, d + 1) / scales[at]),
    targetSquare: Math.max(0, covariance(d + 1, d + 1)),
    means: Float64Array.from(kept, mean),
    scales,
    targetMean: mean(d + 1),
    fills,
  };
}

function correlations(
  kept: readonly number[],
  scales: Float64Array,
  covariance: (row: number, column: number) => number,
): Float64Array {
  const size = kept.length;
  const gram = new Float64Array(size * size);
  for (let i = 0; i < size; i += 1) {
    for (let j = 0; j < i; j += 1) {
      const value = covariance(kept[i], kept[j]) / (scales[i] * scales[j]);
      gram[i * size + j] = value;
      gram[j * size + i] = value;
    }
    gram[i * size + i] = 1;
  }
  return gram;
}

/** Mean of the present readings of the fold, in z; missing ones stand at z = 0 and must move there. */
export function foldFills(moments: Moments, shape: DesignShape): FoldFill[] {
  const { columnCount: d, centres, scales } = shape;
  const width = d + 2;
  const weightSum = moments[d * width + d];
  return shape.filled.flatMap(({ column, indicator }) => {
    const share =
      scales[indicator] === 0
        ? 0
        : centres[indicator] + (scales[indicator] * moments[d * width + indicator]) / weightSum;
    const present = weightSum * (1 - share);
    const shift = present > 1e-9 * weightSum ? moments[d * width + column] / present : 0;
    return shift === 0 ? [] : [{ column, indicator, shift }];
  });
}

/** M ← E M Eᵀ for column ← column + shift · (centre + scale · z of the indicator). */
function applyFills(moments: Moments, shape: DesignShape, fills: readonly FoldFill[]): Moments {
  const { columnCount: d, centres, scales } = shape;
  const width = d + 2;
  const adjusted = moments.slice();
  for (const { column, indicator, shift } of fills) {
    const constant = shift * centres[indicator];
    const slope = shift * scales[indicator];
    for (let other = 0; other < width; other += 1) {
      adjusted[column * width + other] +=
        constant * adjusted[d * width + other] + slope * adjusted[indicator * width + other];
    }
    for (let other = 0; other < width; other += 1) {
      adjusted[other * width + column] +=
        constant * adjusted[other * width + d] + slope * adjusted[other * width + indicator];
    }
  }
  return adjusted;
}

/** A model on the design's own columns: y − targetCentre ≈ constant + Σ weight · z. */
export interface ColumnModel {
  readonly constant: number;
  readonly weights: Float64Array;
}

/** From standardised weights of the kept columns back to the design's columns. */
export function toColumnModel(
  problem: StandardisedProblem,
  standardised: ArrayLike<number>,
  shape: DesignShape,
): ColumnModel {
  const weights = new Float64Array(shape.columnCount);
  let constant = problem.targetMean;
  for (let index = 0; index < problem.size; index += 1) {
    const weight = standardised[index] / problem.scales[index];
    weights[problem.kept[index]] = weight;
    constant -= weight * problem.means[index];
  }
  for (const { column, indicator, shift } of problem.fills) {
    constant += weights[column] * shift * shape.centres[indicator];
    weights[indicator] += weights[column] * shift * shape.scales[indicator];
  }
  return { constant, weights };
}

/** Σ w (y − constant − z·b)² from moments: vᵀ M v with v = (−b, −constant, 1). Loses digits when the residuals are tiny beside y. */
export function squaredError(moments: Moments, model: ColumnModel): number {
  const d = model.weights.length;
  const width = d + 2;
  const vector = new Float64Array(width);
  const used: number[] = [];
  for (let column = 0; column < d; column += 1) {
    if (model.weights[column] !== 0) used.push(column);
    vector[column] = -model.weights[column];
  }
  vector[d] = -model.constant;
  vector[d + 1] = 1;
  used.push(d, d + 1);
  let total = 0;
  for (const row of used) {
    let sum = 0;
    for (const column of used) sum += moments[row * width + column] * vector[column];
    total += sum * vector[row];
  }
  return total;
}
