import type { StandardisedRows } from '../design/standardised-rows';
import { crossProduct } from '../linear-algebra/cross-product';
import { applyForward, applyTransposed, solveShifted, tridiagonalise } from '../linear-algebra/tridiagonal';
import { tridiagonalEigenvalues } from '../linear-algebra/tridiagonal-eigenvalues';
import type { ColumnPenalties } from './column-penalties';
import type { RidgeForm } from './ridge-form';
import { wideProblem, type WideProblem } from './wide-problem';

/**
 * Ridge with more columns than records, in the dual: with Z = X P^(−½), K = ZZᵀ/n and (K + λI) u = y/n, the scaled weights are
 * Zᵀu (Saunders, Gammerman and Vovk 1998). One tridiagonal reduction of the records × records matrix K serves every λ.
 * Cost n² p + 4/3 n³, then n p a λ.
 */
export function ridgeFromDual(source: StandardisedRows, penalties: ColumnPenalties): RidgeForm {
  const problem = wideProblem(source, penalties);
  const { rows, held, weightSum } = problem;
  const inverseRoots = Float64Array.from(held, (column) => 1 / Math.sqrt(penalties.factors[column]));
  const transposed = transposeScaled(problem, inverseRoots);
  const kernel = crossProduct(transposed, rows, { rowCount: held.length, start: 0, end: held.length });
  for (let entry = 0; entry < kernel.length; entry += 1) kernel[entry] /= weightSum;
  const form = tridiagonalise(kernel, rows);
  const rotated = problem.y.map((value) => value / weightSum);
  applyTransposed(form, rotated, 1);
  const values = tridiagonalEigenvalues(form).map((value) => Math.max(0, value));
  return {
    freeCount: problem.freeCount,
    eigenvalues: values,
    targetSquare: problem.targetSquare,
    weights: (lambdas) => {
      const solved = new Float64Array(rows * lambdas.length);
      lambdas.forEach((lambda, at) =>
        solveShifted(form, lambda, rotated).forEach((value, row) => (solved[row * lambdas.length + at] = value)),
      );
      applyForward(form, solved, lambdas.length);
      return primalWeights(problem, inverseRoots, solved, lambdas.length);
    },
    parts: (lambda) => {
      // Residual y − ZZᵀu = nλu, and ‖Zᵀu‖² = n uᵀKu = uᵀ(y − nλu).
      const solved = solveShifted(form, lambda, rotated);
      let square = 0;
      let along = 0;
      solved.forEach((value, row) => {
        square += value * value;
        along += value * rotated[row] * weightSum;
      });
      const scaled = weightSum * lambda;
      return {
        residualSquare: (scaled * scaled * square) / weightSum,
        penaltySquare: Math.max(0, along - scaled * square),
      };
    },
  };
}

/** Zᵀ column-major: held × rows. */
function transposeScaled({ x, rows, held }: WideProblem, inverseRoots: Float64Array): Float64Array {
  const count = held.length;
  const transposed = new Float64Array(rows * count);
  for (let column = 0; column < count; column += 1) {
    const scale = inverseRoots[column];
    for (let row = 0; row < rows; row += 1) transposed[row * count + column] = x[column * rows + row] * scale;
  }
  return transposed;
}

/** b = P^(−½) Zᵀ u for every λ at once; `solved` is rows × count. */
function primalWeights(
  problem: WideProblem,
  inverseRoots: Float64Array,
  solved: Float64Array,
  count: number,
): Float64Array[] {
  const { rows, held, x } = problem;
  const weights = Array.from({ length: count }, () => new Float64Array(held.length));
  const sums = new Float64Array(count);
  for (let column = 0; column < held.length; column += 1) {
    sums.fill(0);
    let row = 0;
    for (; row + 3 < rows; row += 4) addFourRows(sums, x, column * rows + row, solved, row * count);
    for (; row < rows; row += 1) addRow(sums, x[column * rows + row], solved, row * count);
    const scale = inverseRoots[column] * inverseRoots[column];
    for (let k = 0; k < count; k += 1) weights[k][column] = sums[k] * scale;
  }
  return weights.map((heldWeights) => problem.restore(heldWeights));
}

/** sums[k] += Σ over four rows of x · solved[row][k]. */
function addFourRows(sums: Float64Array, x: Float64Array, at: number, solved: Float64Array, from: number): void {
  const count = sums.length;
  const x0 = x[at],
    x1 = x[at + 1],
    x2 = x[at + 2],
    x3 = x[at + 3];
  const second = from + count,
    third = second + count,
    fourth = third + count;
  for (let k = 0; k < count; k += 1) {
    sums[k] += x0 * solved[from + k] + x1 * solved[second + k] + (x2 * solved[third + k] + x3 * solved[fourth + k]);
  }
}

function addRow(sums: Float64Array, value: number, solved: Float64Array, from: number): void {
  for (let k = 0; k < sums.length; k += 1) sums[k] += value * solved[from + k];
}
