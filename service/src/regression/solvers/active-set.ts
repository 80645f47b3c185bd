import { UpdatedCholesky } from '../linear-algebra/updated-cholesky';
import type { HeldPenalty } from './held-penalty';
import type { HeldProblem } from './project-free';

/** After this many changes a factor is built afresh, so that rounding does not pile up. */
const MOST_CHANGES = 4000;

/**
 * Exact minimum on the active set with its signs kept: (A + Q)_AA b_A = c_A − absolute · sign(b_A). Where the solution would
 * change a sign, b moves toward it until the first weight reaches 0, which leaves the active set (the objective only falls);
 * where the active columns depend on each other, b moves along the null direction that does not raise the penalty until one
 * weight reaches 0. So it ends after at most |A| steps (Osborne, Presnell and Turlach 2000). The factor is kept as long
 * as the square penalty stays (for lasso from one λ to the next): columns join and leave it at |A|² each.
 */
export class ActiveSetSolver {
  private factor = new UpdatedCholesky();
  /** Columns in the order of the factor. */
  private active: number[] = [];
  /** Square penalty that the factor was built with. */
  private square: Float64Array = new Float64Array(0);
  private changes = 0;

  /** Updates `weights` in place; false when more than `most` weights are in use. */
  solve(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array, most: number): boolean {
    if (weights.reduce((count, weight) => count + (weight === 0 ? 0 : 1), 0) > most) return false;
    this.discardIfStale(penalty);
    this.dropUnused(weights);
    this.takeIn(held, penalty, weights);
    for (;;) {
      const leaving = this.stepToMinimum(held, penalty, weights);
      if (leaving < 0) return true;
      weights[leaving] = 0;
      this.drop(this.active.indexOf(leaving));
    }
  }

  private discardIfStale(penalty: HeldPenalty): void {
    const same = this.square.every((value, column) => value === penalty.square[column]);
    this.square = penalty.square;
    if (!same || this.changes > MOST_CHANGES) this.reset();
  }

  reset(): void {
    this.factor = new UpdatedCholesky();
    this.active = [];
    this.changes = 0;
  }

  private dropUnused(weights: Float64Array): void {
    for (let at = this.active.length - 1; at >= 0; at -= 1) if (weights[this.active[at]] === 0) this.drop(at);
  }

  private drop(at: number): void {
    this.factor.remove(at);
    this.active.splice(at, 1);
    this.changes += 1;
  }

  /** Takes every column with a weight into the factor; where one depends on those inside, a weight goes to 0 first. */
  private takeIn(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array): void {
    const inside = new Set(this.active);
    for (let j = 0; j < held.size; j += 1) {
      while (weights[j] !== 0 && !inside.has(j)) {
        const row = j * held.size;
        const products = Float64Array.from(this.active, (other) => held.gram[row + other]);
        if (this.factor.append(products, held.gram[row + j] + penalty.square[j])) {
          this.active.push(j);
          this.changes += 1;
          break;
        }
        const leaving = this.stepAlongNull(held, penalty, weights, j);
        weights[leaving] = 0;
        const at = this.active.indexOf(leaving);
        if (at >= 0) this.drop(at);
      }
    }
  }

  private stepToMinimum(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array): number {
    const right = this.active.map((j) => held.cross[j] - penalty.absolute[j] * Math.sign(weights[j]));
    const target = this.factor.solve(right);
    return moveAlong(
      target.map((value, at) => value - weights[this.active[at]]),
      weights,
      this.active,
      1,
    );
  }

  /** v with (A + Q)v = 0 on the factor's columns and the dependent one, in the direction in which the penalty does not grow. */
  private stepAlongNull(held: HeldProblem, penalty: HeldPenalty, weights: Float64Array, dependent: number): number {
    const columns = [...this.active, dependent];
    const combination = this.factor.solve(this.active.map((j) => held.gram[dependent * held.size + j]));
    const direction = Float64Array.from(columns, (_, at) => (at < combination.length ? -combination[at] : 1));
    const slope = columns.reduce((sum, j, at) => sum + direction[at] * Math.sign(weights[j]) * penalty.absolute[j], 0);
    const turn = slope !== 0 ? slope > 0 : weights[dependent] > 0;
    const leaving = moveAlong(turn ? direction.map((value) => -value) : direction, weights, columns, Infinity);
    return leaving < 0 ? dependent : leaving;
  }
}

/** weights += step · direction with the largest step ≤ `longest` that changes no sign; the column that stops it, or −1. */
function moveAlong(
  direction: Float64Array,
  weights: Float64Array,
  columns: readonly number[],
  longest: number,
): number {
  let step = longest;
  let leaving = -1;
  direction.forEach((change, at) => {
    const weight = weights[columns[at]];
    if (change * weight >= 0) return;
    const reach = -weight / change;
    if (reach < step || (reach === step && leaving < 0)) {
      step = reach;
      leaving = columns[at];
    }
  });
  if (step === Infinity) return -1;
  direction.forEach((change, at) => (weights[columns[at]] += step * change));
  return leaving;
}
