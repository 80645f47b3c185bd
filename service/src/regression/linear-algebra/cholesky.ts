/** Lower factor of A = L Lᵀ, row-major; `dependent` is the first column that is a combination of those before it, or −1. */
export interface CholeskyFactor {
  readonly size: number;
  readonly lower: Float64Array;
  readonly dependent: number;
}

/** A pivot at or below this share of its diagonal entry means dependence. */
const DEPENDENT_SHARE = 1e-12;

/** `matrix` row-major symmetric, only its lower triangle is read. Stops at the first dependent column. Cost n³/3. */
export function cholesky(matrix: Float64Array, size: number, dependentShare = DEPENDENT_SHARE): CholeskyFactor {
  const lower = new Float64Array(size * size);
  for (let i = 0; i < size; i += 1) {
    for (let j = 0; j < i; j += 1)
      lower[i * size + j] = (matrix[i * size + j] - innerRows(lower, size, i, j, j)) / lower[j * size + j];
    const pivot = matrix[i * size + i] - innerRows(lower, size, i, i, i);
    if (!(pivot > dependentShare * Math.abs(matrix[i * size + i]))) return { size, lower, dependent: i };
    lower[i * size + i] = Math.sqrt(pivot);
  }
  return { size, lower, dependent: -1 };
}

function innerRows(lower: Float64Array, size: number, first: number, second: number, count: number): number {
  const a = first * size,
    b = second * size;
  let s0 = 0,
    s1 = 0,
    s2 = 0,
    s3 = 0;
  let k = 0;
  for (; k + 3 < count; k += 4) {
    s0 += lower[a + k] * lower[b + k];
    s1 += lower[a + k + 1] * lower[b + k + 1];
    s2 += lower[a + k + 2] * lower[b + k + 2];
    s3 += lower[a + k + 3] * lower[b + k + 3];
  }
  for (; k < count; k += 1) s0 += lower[a + k] * lower[b + k];
  return s0 + s1 + (s2 + s3);
}

/** x with L x = right. */
export function solveLower(factor: CholeskyFactor, right: ArrayLike<number>): Float64Array {
  const { size, lower } = factor;
  const solution = Float64Array.from(right);
  for (let i = 0; i < size; i += 1) {
    for (let k = 0; k < i; k += 1) solution[i] -= lower[i * size + k] * solution[k];
    solution[i] /= lower[i * size + i];
  }
  return solution;
}

/** x with L Lᵀ x = right. */
export function solveCholesky(factor: CholeskyFactor, right: ArrayLike<number>): Float64Array {
  const { size, lower } = factor;
  const solution = solveLower(factor, right);
  for (let i = size - 1; i >= 0; i -= 1) {
    for (let k = i + 1; k < size; k += 1) solution[i] -= lower[k * size + i] * solution[k];
    solution[i] /= lower[i * size + i];
  }
  return solution;
}

/** A⁻¹, row-major. */
export function invertCholesky(factor: CholeskyFactor): Float64Array {
  const { size } = factor;
  const inverse = new Float64Array(size * size);
  const unit = new Float64Array(size);
  for (let column = 0; column < size; column += 1) {
    unit[column] = 1;
    const solved = solveCholesky(factor, unit);
    for (let row = 0; row < size; row += 1) inverse[row * size + column] = solved[row];
    unit[column] = 0;
  }
  return inverse;
}
