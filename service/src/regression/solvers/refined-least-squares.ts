import {
  factorise,
  multiplyForward,
  multiplyTransposed,
  solveUpper,
  solveUpperTransposed,
  type QrForm,
} from '../linear-algebra/householder-qr';
import { LongSum } from '../linear-algebra/double-double';
import type { LeastSquaresAnswer } from './least-squares';

/** A column whose part outside the earlier ones is below this share of its length depends on them. */
const DEPENDENT_SHARE = 1e-13;
const MOST_ROUNDS = 12;

/**
 * min ‖y − Xb‖ by Householder QR and iterative refinement of the augmented system r + Xb = y, Xᵀr = 0, its residuals summed
 * in twice the precision (Björck 1967; Björck, Numerical Methods for Least Squares Problems, 1996, section 2.9). Good for
 * condition numbers up to about 1e15, where normal equations stop at 1e8. `x` is column-major rows × columns.
 */
export function refinedLeastSquares(
  x: Float64Array,
  rows: number,
  columns: number,
  y: Float64Array,
): LeastSquaresAnswer {
  const { positions, dependent } = independentColumns(x, rows, columns);
  const used = positions.length;
  const matrix = new Float64Array(rows * used);
  positions.forEach((column, at) => matrix.set(x.subarray(column * rows, (column + 1) * rows), at * rows));
  const qr = factorise(matrix.slice(), rows, used);
  const solution = new Float64Array(used);
  const residual = new Float64Array(rows);
  let previous = Infinity;
  let rounds = 0;
  for (; rounds < MOST_ROUNDS; rounds += 1) {
    const { step, change } = correction(matrix, qr, y, solution, residual);
    if (!(change < previous / 2) && rounds > 1) break;
    step.apply();
    previous = change;
    if (change === 0) break;
  }
  const weights = new Float64Array(columns);
  positions.forEach((column, at) => (weights[column] = solution[at]));
  return { weights, dependent, iterations: rounds };
}

interface Step {
  apply(): void;
}

/** One solve of [I X; Xᵀ 0] (δr, δb) = (y − r − Xb, −Xᵀr). */
function correction(
  matrix: Float64Array,
  qr: QrForm,
  y: Float64Array,
  solution: Float64Array,
  residual: Float64Array,
): { step: Step; change: number } {
  const { rows, columns } = qr;
  const first = Float64Array.from({ length: rows }, (_, row) => {
    const sum = new LongSum();
    sum.add(y[row]);
    sum.add(-residual[row]);
    for (let column = 0; column < columns; column += 1) sum.addProduct(-matrix[column * rows + row], solution[column]);
    return sum.value();
  });
  const second = Float64Array.from({ length: columns }, (_, column) => {
    const sum = new LongSum();
    for (let row = 0; row < rows; row += 1) sum.addProduct(-matrix[column * rows + row], residual[row]);
    return sum.value();
  });
  const inner = solveUpperTransposed(qr, second, columns);
  multiplyTransposed(qr, first);
  const weightStep = solveUpper(
    qr,
    Float64Array.from(inner, (value, k) => first[k] - value),
    columns,
  );
  const residualStep = first.map((value, row) => (row < columns ? inner[row] : value));
  multiplyForward(qr, residualStep);
  let change = 0;
  weightStep.forEach((value, k) => (change = Math.max(change, Math.abs(value) / (Math.abs(solution[k]) || 1))));
  const apply = (): void => {
    weightStep.forEach((value, k) => (solution[k] += value));
    residualStep.forEach((value, row) => (residual[row] += value));
  };
  return { step: { apply }, change };
}

function independentColumns(
  x: Float64Array,
  rows: number,
  columns: number,
): { positions: number[]; dependent: number[] } {
  const positions: number[] = [];
  const dependent: number[] = [];
  let qr = factorise(x.slice(), rows, columns);
  const lengths = Float64Array.from({ length: columns }, (_, column) => lengthOf(x, column, rows));
  const isDependent = (form: QrForm, at: number, column: number): boolean =>
    at >= form.diagonal.length || Math.abs(form.diagonal[at]) <= DEPENDENT_SHARE * lengths[column];
  let remaining = Array.from({ length: columns }, (_, column) => column);
  for (;;) {
    const bad = remaining.findIndex((column, at) => isDependent(qr, at, column));
    if (bad < 0) break;
    dependent.push(remaining[bad]);
    remaining = remaining.filter((_, at) => at !== bad);
    const next = new Float64Array(rows * remaining.length);
    remaining.forEach((column, at) => next.set(x.subarray(column * rows, (column + 1) * rows), at * rows));
    qr = factorise(next, rows, remaining.length);
  }
  positions.push(...remaining);
  return { positions, dependent };
}

function lengthOf(x: Float64Array, column: number, rows: number): number {
  let square = 0;
  for (let row = 0; row < rows; row += 1) square += x[column * rows + row] ** 2;
  return Math.sqrt(square);
}
