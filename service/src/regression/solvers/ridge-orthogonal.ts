import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import type { StandardisedRows } from '../design/standardised-rows';
import { factorise, multiplyTransposed, upper, type QrForm } from '../linear-algebra/householder-qr';
import { freePositions, heldPositions, type ColumnPenalties } from './column-penalties';
import { dependentError } from './project-free';
import type { RidgeForm } from './ridge-form';

const DEPENDENT_SHARE = 1e-12;

interface Reduced {
  readonly free: readonly number[];
  readonly held: readonly number[];
  readonly qr: QrForm;
  readonly rotatedTarget: Float64Array;
  readonly inverseRoots: Float64Array;
  readonly size: number;
}

/**
 * Ridge from the rows: QR with the free columns first, then the SVD of the remaining block of R. No product of columns is
 * formed, so digits are lost with the condition number, not with its square. Cost 2 n p² + O(p³).
 */
export function ridgeFromRows(rows: StandardisedRows, penalties: ColumnPenalties): RidgeForm {
  const reduced = reduce(rows, penalties);
  const { weightSum } = rows.problem;
  const freeCount = reduced.free.length;
  const { left, singular, right } = decompose(reduced);
  const rank = singular.length;
  const projected = Float64Array.from({ length: rank }, (_, k) =>
    left.reduce((sum, row, i) => sum + row[k] * reduced.rotatedTarget[freeCount + i], 0),
  );
  const tailSquare = reduced.rotatedTarget.slice(freeCount).reduce((sum, value) => sum + value * value, 0);
  const explainable = projected.reduce((sum, value) => sum + value * value, 0);
  const unexplained = outsideSquare(reduced.rotatedTarget, freeCount, left, projected, tailSquare - explainable);
  const shrink = (lambda: number, k: number): number => {
    const sum = singular[k] * singular[k] + weightSum * lambda;
    return sum === 0 ? 0 : (singular[k] * projected[k]) / sum;
  };
  return {
    freeCount,
    eigenvalues: paddedEigenvalues(singular, reduced.held.length, weightSum),
    targetSquare: tailSquare / weightSum,
    weights: (lambdas) =>
      lambdas.map((lambda) =>
        restore(
          reduced,
          right.map((row) => row.reduce((sum, entry, k) => sum + entry * shrink(lambda, k), 0)),
        ),
      ),
    parts: (lambda) => {
      let residual = unexplained;
      let penaltySquare = 0;
      for (let k = 0; k < rank; k += 1) {
        const x = shrink(lambda, k);
        residual += (projected[k] - singular[k] * x) ** 2;
        penaltySquare += x * x;
      }
      return { residualSquare: residual / weightSum, penaltySquare };
    },
  };
}

function reduce(rows: StandardisedRows, penalties: ColumnPenalties): Reduced {
  const free = freePositions(penalties);
  const held = heldPositions(penalties);
  const order = [...free, ...held];
  const data = new Float64Array(rows.x.length);
  order.forEach((column, at) =>
    data.set(rows.x.subarray(column * rows.rowCount, (column + 1) * rows.rowCount), at * rows.rowCount),
  );
  const qr = factorise(data, rows.rowCount, order.length);
  const limit = DEPENDENT_SHARE * Math.sqrt(rows.problem.weightSum);
  if (free.some((_, k) => k >= qr.diagonal.length || Math.abs(qr.diagonal[k]) <= limit)) throw dependentError();
  const rotatedTarget = rows.y.slice();
  multiplyTransposed(qr, rotatedTarget);
  const inverseRoots = Float64Array.from(held, (column) => 1 / Math.sqrt(penalties.factors[column]));
  return { free, held, qr, rotatedTarget, inverseRoots, size: order.length };
}

interface Decomposition {
  readonly left: readonly (readonly number[])[];
  readonly singular: readonly number[];
  readonly right: readonly (readonly number[])[];
}

/** SVD of the held block of R with its columns divided by √p. */
function decompose({ free, held, qr, inverseRoots }: Reduced): Decomposition {
  const rowCount = Math.min(qr.diagonal.length - free.length, held.length);
  if (held.length === 0 || rowCount <= 0) return { left: [], singular: [], right: held.map(() => []) };
  const block = new Matrix(rowCount, held.length);
  for (let i = 0; i < rowCount; i += 1) {
    for (let j = 0; j < held.length; j += 1)
      block.set(i, j, upper(qr, free.length + i, free.length + j) * inverseRoots[j]);
  }
  const svd = new SingularValueDecomposition(block, { autoTranspose: true });
  return {
    left: svd.leftSingularVectors.to2DArray(),
    singular: svd.diagonal,
    right: svd.rightSingularVectors.to2DArray(),
  };
}

/** Squared length of what no held column reaches: below R, plus what the left vectors miss inside it. */
function outsideSquare(
  rotated: Float64Array,
  freeCount: number,
  left: Decomposition['left'],
  projected: Float64Array,
  difference: number,
): number {
  if (left.length > projected.length) return Math.max(0, difference);
  let square = 0;
  for (let row = freeCount + left.length; row < rotated.length; row += 1) square += rotated[row] * rotated[row];
  return square;
}

function paddedEigenvalues(singular: readonly number[], count: number, weightSum: number): Float64Array {
  const eigenvalues = new Float64Array(count);
  singular.forEach((value, k) => (eigenvalues[k] = (value * value) / weightSum));
  return eigenvalues.sort();
}

/** b_H = x/√p, then b_F by back substitution in R. */
function restore(
  { free, held, qr, rotatedTarget, inverseRoots, size }: Reduced,
  scaled: readonly number[],
): Float64Array {
  const heldWeights = scaled.map((value, index) => value * inverseRoots[index]);
  const weights = new Float64Array(size);
  held.forEach((column, index) => (weights[column] = heldWeights[index]));
  for (let row = free.length - 1; row >= 0; row -= 1) {
    let rest = rotatedTarget[row];
    for (let column = row + 1; column < free.length; column += 1)
      rest -= upper(qr, row, column) * weights[free[column]];
    heldWeights.forEach((weight, index) => (rest -= upper(qr, row, free.length + index) * weight));
    weights[free[row]] = rest / qr.diagonal[row];
  }
  return weights;
}
