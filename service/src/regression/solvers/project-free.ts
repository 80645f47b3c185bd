import { RegressionError } from '../errors';
import type { StandardisedProblem } from '../design/moments';
import { cholesky, solveCholesky, type CholeskyFactor } from '../linear-algebra/cholesky';
import { freePositions, heldPositions, type ColumnPenalties } from './column-penalties';

/** min over b_H of ½ yy − c·b + ½ bᵀAb + penalty(b), after the free columns F have been projected out exactly. */
export interface HeldProblem {
  readonly size: number;
  readonly held: readonly number[];
  readonly gram: Float64Array;
  readonly cross: Float64Array;
  readonly targetSquare: number;
  readonly freeCount: number;
  /** Weights of all kept columns from those of the held ones. */
  restore(heldWeights: ArrayLike<number>): Float64Array;
}

/**
 * A = S_HH − S_HF S_FF⁻¹ S_FH, c = c_H − S_HF S_FF⁻¹ c_F, yy − c_FᵀS_FF⁻¹c_F; then b_F = S_FF⁻¹(c_F − S_FH b_H).
 * Throws `not-identifiable` when free columns depend on each other.
 */
export function projectFree(problem: StandardisedProblem, penalties: ColumnPenalties): HeldProblem {
  const free = freePositions(penalties);
  const held = heldPositions(penalties);
  if (free.length === 0) return unprojected(problem, held);
  const factor = cholesky(block(problem, free, free), free.length);
  if (factor.dependent >= 0) throw dependentError();
  const freeCross = Float64Array.from(free, (column) => problem.cross[column]);
  const solvedCross = solveCholesky(factor, freeCross);
  const solvedBlocks = held.map((column) => solveCholesky(factor, block(problem, free, [column])));
  const size = held.length;
  const gram = block(problem, held, held);
  const cross = Float64Array.from(held, (column) => problem.cross[column]);
  for (let i = 0; i < size; i += 1) {
    const row = block(problem, free, [held[i]]);
    cross[i] -= dot(row, solvedCross);
    for (let j = 0; j < size; j += 1) gram[i * size + j] -= dot(row, solvedBlocks[j]);
  }
  const targetSquare = Math.max(0, problem.targetSquare - dot(freeCross, solvedCross));
  return {
    size,
    held,
    gram,
    cross,
    targetSquare,
    freeCount: free.length,
    restore: restorer(problem, { free, held, factor, freeCross }),
  };
}

export function dependentError(column: string | null = null): RegressionError {
  const which = column === null ? 'An input without a penalty' : column;
  return new RegressionError(
    'not-identifiable',
    `${which} is an exact combination of other inputs, so no penalty-free weight exists for it. Leave it out, or give it a penalty.`,
    column,
  );
}

function unprojected(problem: StandardisedProblem, held: readonly number[]): HeldProblem {
  const { size, gram, cross, targetSquare } = problem;
  return { size, held, gram, cross, targetSquare, freeCount: 0, restore: (weights) => Float64Array.from(weights) };
}

interface Split {
  readonly free: readonly number[];
  readonly held: readonly number[];
  readonly factor: CholeskyFactor;
  readonly freeCross: Float64Array;
}

function restorer(problem: StandardisedProblem, split: Split): HeldProblem['restore'] {
  return (heldWeights) => {
    const right = Float64Array.from(split.free, (row, index) =>
      split.held.reduce(
        (rest, column, at) => rest - problem.gram[row * problem.size + column] * heldWeights[at],
        split.freeCross[index],
      ),
    );
    const freeWeights = solveCholesky(split.factor, right);
    const weights = new Float64Array(problem.size);
    split.free.forEach((column, index) => (weights[column] = freeWeights[index]));
    split.held.forEach((column, index) => (weights[column] = heldWeights[index]));
    return weights;
  };
}

function block(problem: StandardisedProblem, rows: readonly number[], columns: readonly number[]): Float64Array {
  const values = new Float64Array(rows.length * columns.length);
  rows.forEach((row, i) =>
    columns.forEach((column, j) => (values[i * columns.length + j] = problem.gram[row * problem.size + column])),
  );
  return values;
}

function dot(first: Float64Array, second: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < first.length; index += 1) sum += first[index] * second[index];
  return sum;
}
