import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { StandardisedRows } from '../design/standardised-rows';
import { crossProduct } from '../linear-algebra/cross-product';
import type { ColumnPenalties } from '../solvers/column-penalties';

/**
 * The same leave-one-out errors where inputs outnumber records (n × p, p > n, every column held): with Z = X P^(−½) and
 * ZZᵀ/n = U D Uᵀ the hat matrix is √w√wᵀ/Σw + U diag(d/(d + λ)) Uᵀ, so that one n × n eigendecomposition serves every λ
 * (Golub, Heath and Wahba 1979, section 2). Cost n² p + 9 n³ + n² a λ.
 */
export function leaveOneOutErrorsWide(
  source: StandardisedRows,
  penalties: ColumnPenalties,
  intercept: boolean,
  lambdas: readonly number[],
): number[] {
  const { rowCount, rootWeights, y, problem } = source;
  const { vectors, values } = kernelOf(source, penalties);
  const along = values.map((_, k) => y.reduce((sum, value, row) => sum + vectors.get(row, k) * value, 0));
  return lambdas.map((lambda) => {
    const shrink = values.map((value) => (value > 0 ? value / (value + lambda) : 0));
    let total = 0;
    for (let row = 0; row < rowCount; row += 1) {
      let fitted = 0;
      let leverage = intercept ? (rootWeights[row] * rootWeights[row]) / problem.weightSum : 0;
      for (let k = 0; k < shrink.length; k += 1) {
        const entry = vectors.get(row, k);
        fitted += entry * shrink[k] * along[k];
        leverage += entry * entry * shrink[k];
      }
      total += ((y[row] - fitted) / Math.max(1 - leverage, Number.EPSILON)) ** 2;
    }
    return total / problem.weightSum;
  });
}

/** Eigenvectors and eigenvalues of ZZᵀ/n. */
function kernelOf(
  { x, rowCount, problem }: StandardisedRows,
  penalties: ColumnPenalties,
): { readonly vectors: Matrix; readonly values: readonly number[] } {
  const { size, weightSum } = problem;
  const transposed = new Float64Array(size * rowCount);
  for (let column = 0; column < size; column += 1) {
    const scale = 1 / Math.sqrt(penalties.factors[column]);
    for (let row = 0; row < rowCount; row += 1) transposed[row * size + column] = x[column * rowCount + row] * scale;
  }
  const products = crossProduct(transposed, rowCount, { rowCount: size, start: 0, end: size });
  const kernel = new Matrix(rowCount, rowCount);
  for (let row = 0; row < rowCount; row += 1)
    for (let column = 0; column < rowCount; column += 1)
      kernel.set(row, column, products[row * rowCount + column] / weightSum);
  const decomposition = new EigenvalueDecomposition(kernel, { assumeSymmetric: true });
  return { vectors: decomposition.eigenvectorMatrix, values: decomposition.realEigenvalues };
}
