import type { StandardisedRows } from '../design/standardised-rows';
import { factorise, multiplyTransposed, upper } from '../linear-algebra/householder-qr';
import { freePositions, heldPositions, type ColumnPenalties } from './column-penalties';
import { dependentError } from './project-free';

/**
 * More columns than records: the held columns and the target with the free columns projected out (QR of the free ones, whose
 * first rows then determine the free weights), so that no columns × columns matrix is ever formed.
 */
export interface WideProblem {
  /** Records less free columns. */
  readonly rows: number;
  readonly held: readonly number[];
  /** Column-major rows × held. */
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly weightSum: number;
  /** X̃ᵀy/n. */
  readonly cross: Float64Array;
  readonly targetSquare: number;
  readonly freeCount: number;
  restore(heldWeights: ArrayLike<number>): Float64Array;
}

export function wideProblem(source: StandardisedRows, penalties: ColumnPenalties): WideProblem {
  const free = freePositions(penalties);
  const held = heldPositions(penalties);
  const { x: all, rowCount, problem } = source;
  const projected =
    free.length === 0
      ? { x: all, y: source.y, top: new Float64Array(0), restoreFree: () => new Float64Array(0) }
      : projectRows(source, free, held);
  const rows = rowCount - free.length;
  const cross = crossWith(projected.x, rows, held.length, projected.y, problem.weightSum);
  return {
    rows,
    held,
    x: projected.x,
    y: projected.y,
    weightSum: problem.weightSum,
    cross,
    targetSquare: projected.y.reduce((sum, value) => sum + value * value, 0) / problem.weightSum,
    freeCount: free.length,
    restore: (heldWeights) => {
      const weights = new Float64Array(problem.size);
      held.forEach((column, at) => (weights[column] = heldWeights[at]));
      projected.restoreFree(heldWeights).forEach((value, at) => (weights[free[at]] = value));
      return weights;
    },
  };
}

interface ProjectedRows {
  readonly x: Float64Array;
  readonly y: Float64Array;
  restoreFree(heldWeights: ArrayLike<number>): Float64Array;
}

function projectRows(
  { x, y, rowCount, problem }: StandardisedRows,
  free: readonly number[],
  held: readonly number[],
): ProjectedRows {
  const column = (at: number): Float64Array => x.slice(at * rowCount, (at + 1) * rowCount);
  const data = new Float64Array(free.length * rowCount);
  free.forEach((at, index) => data.set(column(at), index * rowCount));
  const qr = factorise(data, rowCount, free.length);
  if (
    qr.diagonal.length < free.length ||
    qr.diagonal.some((value) => Math.abs(value) <= 1e-12 * Math.sqrt(problem.weightSum))
  )
    throw dependentError();
  const rows = rowCount - free.length;
  const below = new Float64Array(rows * held.length);
  const top = held.map((at, index) => {
    const rotated = column(at);
    multiplyTransposed(qr, rotated);
    below.set(rotated.subarray(free.length), index * rows);
    return rotated.slice(0, free.length);
  });
  const target = y.slice();
  multiplyTransposed(qr, target);
  const restoreFree = (heldWeights: ArrayLike<number>): Float64Array => {
    const solved = target.slice(0, free.length);
    for (let row = free.length - 1; row >= 0; row -= 1) {
      top.forEach((values, index) => (solved[row] -= values[row] * heldWeights[index]));
      for (let later = row + 1; later < free.length; later += 1) solved[row] -= upper(qr, row, later) * solved[later];
      solved[row] /= qr.diagonal[row];
    }
    return solved;
  };
  return { x: below, y: target.slice(free.length), restoreFree };
}

/** Xᵀ vector / n. */
export function crossWith(
  x: Float64Array,
  rows: number,
  columns: number,
  vector: Float64Array,
  weightSum: number,
): Float64Array {
  const cross = new Float64Array(columns);
  for (let column = 0; column < columns; column += 1)
    cross[column] = dotAt(x, column * rows, vector, 0, rows) / weightSum;
  return cross;
}

/** Σ first[a + k] second[b + k] over `length`, in four running sums. */
export function dotAt(first: Float64Array, a: number, second: Float64Array, b: number, length: number): number {
  let s0 = 0,
    s1 = 0,
    s2 = 0,
    s3 = 0;
  let k = 0;
  for (; k + 3 < length; k += 4) {
    s0 += first[a + k] * second[b + k];
    s1 += first[a + k + 1] * second[b + k + 1];
    s2 += first[a + k + 2] * second[b + k + 2];
    s3 += first[a + k + 3] * second[b + k + 3];
  }
  for (; k < length; k += 1) s0 += first[a + k] * second[b + k];
  return s0 + s1 + (s2 + s3);
}
