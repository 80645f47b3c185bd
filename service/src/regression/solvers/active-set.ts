import { cholesky, solveCholesky } from '../linear-algebra/cholesky';
import type { HeldPenalty } from './held-penalty';
import type { HeldProblem } from './project-free';

/**
 * Exact minimum on the active set with its signs kept: (A + Q)_AA b_A = c_A − absolute · sign(b_A). Where the solution would
 * change a sign, b moves toward it until the first weight reaches 0, which leaves the active set (the objective only falls);
 * where the active columns depend on each other, b moves along the null direction that does not raise the penalty until one
 * weight reaches 0. So it ends after at most |A| steps (Osborne, Presnell and Turlach 2000). Updates `weights` in place and
 * returns true, or returns false when the set is larger than `most`. Cost |A|³/3 a step.
 */
export function solveOnActiveSet(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array, most: number): boolean {
  let active: number[] = [];
  for (let j = 0; j < held.size; j += 1) if (weights[j] !== 0) active.push(j);
  if (active.length > most) return false;
  while (active.length > 0) {
    const leaving = stepOnce(held, penalty, weights, active);
    if (leaving < 0) return true;
    weights[active[leaving]] = 0;
    active = active.filter((j) => weights[j] !== 0);
  }
  return true;
}

/** One step; the place in `active` of the weight that reached 0, or −1 when the minimum was reached. */
function stepOnce(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array, active: readonly number[]): number {
  const count = active.length;
  const matrix = new Float64Array(count * count);
  active.forEach((row, i) => {
    for (let j = 0; j <= i; j += 1) matrix[i * count + j] = held.gram[row * held.size + active[j]];
    matrix[i * count + i] += penalty.square[row];
  });
  const factor = cholesky(matrix, count);
  const signs = active.map((j) => Math.sign(weights[j]));
  if (factor.dependent >= 0) return moveAlong(nullDirection(held, penalty, active, signs, factor.dependent), weights, active, Infinity);
  const target = solveCholesky(factor, active.map((j, i) => held.cross[j] - penalty.absolute[j] * signs[i]));
  return moveAlong(target.map((value, i) => value - weights[active[i]]), weights, active, 1);
}

/** v with (A + Q) v = 0 on the first k + 1 active columns, in the direction in which the absolute penalty does not grow. */
function nullDirection(held: HeldProblem, penalty: HeldPenalty, active: readonly number[], signs: readonly number[], k: number): Float64Array {
  const matrix = new Float64Array(k * k);
  for (let i = 0; i < k; i += 1) {
    for (let j = 0; j <= i; j += 1) matrix[i * k + j] = held.gram[active[i] * held.size + active[j]];
    matrix[i * k + i] += penalty.square[active[i]];
  }
  const combination = solveCholesky(cholesky(matrix, k), active.slice(0, k).map((j) => held.gram[active[k] * held.size + j]));
  const direction = new Float64Array(active.length);
  combination.forEach((value, i) => (direction[i] = -value));
  direction[k] = 1;
  const slope = direction.reduce((sum, value, i) => sum + value * signs[i] * penalty.absolute[active[i]], 0);
  const towardZero = slope !== 0 ? slope > 0 : direction[k] * signs[k] > 0;
  return towardZero ? direction.map((value) => -value) : direction;
}

/** weights += step · direction with the largest step ≤ `longest` that changes no sign; the place of the weight that stops it, or −1. */
function moveAlong(direction: Float64Array, weights: Float64Array, active: readonly number[], longest: number): number {
  let step = longest;
  let leaving = -1;
  direction.forEach((change, i) => {
    const weight = weights[active[i]];
    if (change * weight >= 0) return;
    const reach = -weight / change;
    if (reach < step || (reach === step && leaving < 0)) {
      step = reach;
      leaving = i;
    }
  });
  if (step === Infinity) return 0;
  direction.forEach((change, i) => (weights[active[i]] += step * change));
  return leaving;
}
