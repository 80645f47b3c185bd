import { cholesky, invertCholesky } from '../linear-algebra/cholesky';
import type { HeldPenalty } from './held-penalty';
import type { HeldProblem } from './project-free';

/**
 * Degrees of freedom of the held columns: the number of weights that are not 0 (Zou, Hastie and Tibshirani 2007), less
 * trace(Q (A + Q)⁻¹) on them where there is a square penalty Q.
 */
export function activeDegrees(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array): number {
  const active = Array.from(weights.keys()).filter((j) => weights[j] !== 0);
  const count = active.length;
  if (active.every((j) => penalty.square[j] === 0)) return count;
  const matrix = new Float64Array(count * count);
  active.forEach((row, i) => {
    active.forEach((column, j) => (matrix[i * count + j] = held.gram[row * held.size + column]));
    matrix[i * count + i] += penalty.square[row];
  });
  const factor = cholesky(matrix, count, 0);
  if (factor.dependent >= 0) return count;
  const inverse = invertCholesky(factor);
  return active.reduce((degrees, j, i) => degrees - penalty.square[j] * inverse[i * count + i], count);
}
