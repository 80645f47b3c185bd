import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { DesignMatrix } from '../design/design-matrix';
import type { StandardisedProblem } from '../design/moments';
import { cholesky, solveCholesky } from '../linear-algebra/cholesky';
import { freePositions, heldPositions, type ColumnPenalties } from '../solvers/column-penalties';
import { dependentError } from '../solvers/project-free';

/**
 * Features f = Tᵀx̃ of the kept columns in which a ridge hat matrix is diagonal for every λ:
 *   hᵢ(λ) = wᵢ/n [1 + Σ_k f_ik² s_k(λ)],  s_k = 1 for a direction of the free columns, 1/(d_k + λ) for a held one,
 * and the fitted weights are T diag(s) Tᵀ c. T is size × size, row-major; its first `freeCount` columns are the free ones.
 */
export interface HatFeatures {
  readonly size: number;
  readonly freeCount: number;
  readonly transform: Float64Array;
  readonly eigenvalues: Float64Array;
  /** Tᵀ c. */
  readonly cross: Float64Array;
}

/** Directions below this share of the strongest are rounding; they count only through λ. */
const NULL_SHARE = 1e-14;

/** Cost: one eigendecomposition of the held columns, about 9 p³. */
export function hatFeatures(problem: StandardisedProblem, penalties: ColumnPenalties): HatFeatures {
  const free = freePositions(penalties);
  const held = heldPositions(penalties);
  const { size, gram } = problem;
  const transform = new Float64Array(size * size);
  const entry = (row: number, column: number): number => gram[row * size + column];
  const freeGram = Float64Array.from(free.flatMap((row) => free.map((column) => entry(row, column))));
  const factor = cholesky(freeGram, free.length);
  if (factor.dependent >= 0) throw dependentError();
  free.forEach((_, k) => {
    const column = inverseTransposedColumn(factor.lower, free.length, k);
    free.forEach((position, row) => (transform[position * size + k] = column[row]));
  });
  const solved = held.map((column) =>
    solveCholesky(
      factor,
      free.map((row) => entry(row, column)),
    ),
  );
  const scale = held.map((column) => 1 / Math.sqrt(penalties.factors[column] || 1));
  const projected = new Matrix(held.length, held.length);
  held.forEach((row, i) =>
    held.forEach((column, j) => {
      const shared = free.reduce((sum, position, k) => sum + entry(position, row) * solved[j][k], 0);
      projected.set(i, j, (entry(row, column) - shared) * scale[i] * scale[j]);
    }),
  );
  const eigenvalues =
    held.length === 0
      ? new Float64Array(0)
      : addHeldFeatures({ projected, held, free, solved, scale, size }, transform);
  return {
    size,
    freeCount: free.length,
    transform,
    eigenvalues,
    cross: transposedProduct(transform, problem.cross, size),
  };
}

interface HeldFeatures {
  readonly projected: Matrix;
  readonly held: readonly number[];
  readonly free: readonly number[];
  readonly solved: readonly Float64Array[];
  readonly scale: readonly number[];
  readonly size: number;
}

function addHeldFeatures(
  { projected, held, free, solved, scale, size }: HeldFeatures,
  transform: Float64Array,
): Float64Array {
  const decomposition = new EigenvalueDecomposition(projected, { assumeSymmetric: true });
  const vectors = decomposition.eigenvectorMatrix;
  held.forEach((_, k) => {
    held.forEach((position, row) => {
      const value = vectors.get(row, k) * scale[row];
      transform[position * size + free.length + k] = value;
      free.forEach((freePosition, f) => (transform[freePosition * size + free.length + k] -= solved[row][f] * value));
    });
  });
  const values = Float64Array.from(decomposition.realEigenvalues);
  const floor = NULL_SHARE * values.length * values.reduce((most, value) => Math.max(most, value), 0);
  return values.map((value) => (value > floor ? value : 0));
}

/** Column k of L⁻ᵀ. */
function inverseTransposedColumn(lower: Float64Array, size: number, k: number): Float64Array {
  const solution = new Float64Array(size);
  solution[k] = 1;
  for (let row = size - 1; row >= 0; row -= 1) {
    for (let below = row + 1; below < size; below += 1) solution[row] -= lower[below * size + row] * solution[below];
    solution[row] /= lower[row * size + row];
  }
  return solution;
}

function transposedProduct(matrix: Float64Array, vector: Float64Array, size: number): Float64Array {
  const product = new Float64Array(size);
  for (let row = 0; row < size; row += 1)
    for (let column = 0; column < size; column += 1) product[column] += matrix[row * size + column] * vector[row];
  return product;
}

/** s_k(λ); a null direction without a penalty gets 0. */
export function featureShrink(features: HatFeatures, lambda: number): Float64Array {
  const shrink = new Float64Array(features.size).fill(1);
  features.eigenvalues.forEach(
    (value, k) => (shrink[features.freeCount + k] = value + lambda > 0 ? 1 / (value + lambda) : 0),
  );
  return shrink;
}

/** M = T diag(s) Tᵀ, row-major: the penalised inverse of S. */
export function penalisedInverse(features: HatFeatures, lambda: number): Float64Array {
  const { size, transform } = features;
  const shrink = featureShrink(features, lambda);
  const inverse = new Float64Array(size * size);
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column <= row; column += 1) {
      let sum = 0;
      for (let k = 0; k < size; k += 1) sum += transform[row * size + k] * shrink[k] * transform[column * size + k];
      inverse[row * size + column] = sum;
      inverse[column * size + row] = sum;
    }
  }
  return inverse;
}

/** √w x̃ of one position of the design. */
export function standardisedRow(design: DesignMatrix, problem: StandardisedProblem, position: number): Float64Array {
  const { rowCount, columnCount, data } = design;
  const root = data[columnCount * rowCount + position];
  const row = new Float64Array(problem.size);
  for (let at = 0; at < row.length; at += 1)
    row[at] = (data[problem.kept[at] * rowCount + position] - problem.means[at] * root) / problem.scales[at];
  return row;
}

/** f = Tᵀ x. */
export function featuresOf(features: HatFeatures, row: Float64Array): Float64Array {
  return transposedProduct(features.transform, row, features.size);
}
