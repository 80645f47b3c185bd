import type { DesignMatrix } from '../design/design-matrix';
import type { StandardisedProblem } from '../design/moments';
import { standardisedRow } from './hat-features';

/** At most this many records, evenly spaced, have their leverage worked out on large tables. */
const MOST_RECORDS = 20000;

/** Positions of the design: all, or an even selection. */
export function sampledPositions(rowCount: number, most: number = MOST_RECORDS): Int32Array {
  const count = Math.min(rowCount, most);
  return Int32Array.from({ length: count }, (_, index) => Math.floor((index * rowCount) / count));
}

/** The columns that leverage is measured on, as positions among the kept ones, and M with h = w(base + x̃ᵀMx̃), M = inverse/n. */
export interface LeverageMatrix {
  readonly positions: readonly number[];
  readonly matrix: Float64Array;
  readonly base: number;
}

/** Leverages at the given positions. Cost positions · p². */
export function leverages(
  design: DesignMatrix,
  problem: StandardisedProblem,
  lever: LeverageMatrix,
  positions: Int32Array,
): Float64Array {
  const { rowCount, columnCount, data } = design;
  const size = lever.positions.length;
  return Float64Array.from(positions, (position) => {
    const whole = standardisedRow(design, problem, position);
    const row = lever.positions.map((at) => whole[at]);
    const root = data[columnCount * rowCount + position];
    let total = lever.base * root * root;
    for (let i = 0; i < size; i += 1) {
      let inner = 0;
      const at = i * size;
      for (let j = 0; j < i; j += 1) inner += lever.matrix[at + j] * row[j];
      total += row[i] * (2 * inner + lever.matrix[at + i] * row[i]);
    }
    return Math.max(0, total);
  });
}

/** Cook (1977): D = r² h / (p σ² (1 − h)²) with p the degrees of freedom, the intercept counted, and r times √w. */
export function cooksDistance(residual: number, leverage: number, degrees: number, variance: number): number {
  const left = Math.max(1 - leverage, 1e-12);
  return variance > 0 && degrees > 0 ? (residual * residual * leverage) / (degrees * variance * left * left) : 0;
}
