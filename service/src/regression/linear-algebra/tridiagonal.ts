/**
 * Householder reduction of a symmetric matrix to tridiagonal form, A = Q T Qᵀ, and what a whole ridge path needs of it:
 * (A + λI)⁻¹ c = Q (T + λI)⁻¹ Qᵀ c costs O(n) in the middle for each λ, without any eigenvector.
 * (Golub and Van Loan, Matrix Computations, 4th ed. 2013, section 8.3.1; Eldén 1977 for the use on ridge.)
 * ml-matrix has the reduction only inside its full eigendecomposition, which costs about six times as much.
 */
export interface Tridiagonal {
  readonly size: number;
  readonly diagonal: Float64Array;
  /** offDiagonal[i] joins i and i + 1; the last entry is 0. */
  readonly offDiagonal: Float64Array;
  /** Row k holds Householder vector k in its columns k + 1 … (row-major n × n), with factor beta[k]: H = I − beta v vᵀ. */
  readonly reflectors: Float64Array;
  readonly betas: Float64Array;
}

/** `matrix` (row-major, symmetric) is overwritten. Cost 4/3 n³. */
export function tridiagonalise(matrix: Float64Array, size: number): Tridiagonal {
  const diagonal = new Float64Array(size);
  const offDiagonal = new Float64Array(size);
  const betas = new Float64Array(size);
  const product = new Float64Array(size);
  for (let k = 0; k < size - 1; k += 1) {
    diagonal[k] = matrix[k * size + k];
    const row = matrix.subarray(k * size, (k + 1) * size);
    [betas[k], offDiagonal[k]] = makeReflector(row, k + 1, size);
    if (betas[k] !== 0) reflectBothSides(matrix, size, k, betas[k], product);
  }
  if (size > 0) diagonal[size - 1] = matrix[size * size - 1];
  return { size, diagonal, offDiagonal, reflectors: matrix, betas };
}

/** Turns row[from…] into the vector v with (I − βvvᵀ) row = (α, 0, …); returns β and α. */
function makeReflector(row: Float64Array, from: number, size: number): [number, number] {
  let largest = 0;
  for (let j = from; j < size; j += 1) largest = Math.max(largest, Math.abs(row[j]));
  if (largest === 0) return [0, 0];
  let tail = 0;
  for (let j = from + 1; j < size; j += 1) tail += (row[j] / largest) ** 2;
  if (tail === 0) return [0, row[from]];
  const head = row[from] / largest;
  const norm = Math.sqrt(head * head + tail);
  const alpha = head > 0 ? -norm : norm;
  row[from] = head - alpha;
  for (let j = from + 1; j < size; j += 1) row[j] /= largest;
  return [2 / ((head - alpha) ** 2 + tail), alpha * largest];
}

/** A ← H A H on the trailing block: p = βAv, w = p − (β pᵀv / 2) v, A ← A − v wᵀ − w vᵀ; lower triangle mirrored as it goes. */
function reflectBothSides(matrix: Float64Array, size: number, k: number, beta: number, product: Float64Array): void {
  const vectorAt = k * size;
  let inner = 0;
  for (let i = k + 1; i < size; i += 1) {
    product[i] = beta * dot(matrix, i * size, vectorAt, k + 1, size);
    inner += product[i] * matrix[vectorAt + i];
  }
  const half = (beta * inner) / 2;
  for (let i = k + 1; i < size; i += 1) product[i] -= half * matrix[vectorAt + i];
  for (let i = k + 1; i < size; i += 1) rankTwoRow(matrix, size, { row: i * size, vectorAt, from: k + 1, v: matrix[vectorAt + i] }, product);
}

function dot(matrix: Float64Array, rowAt: number, vectorAt: number, from: number, size: number): number {
  let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
  let j = from;
  for (; j + 3 < size; j += 4) {
    s0 += matrix[rowAt + j] * matrix[vectorAt + j];
    s1 += matrix[rowAt + j + 1] * matrix[vectorAt + j + 1];
    s2 += matrix[rowAt + j + 2] * matrix[vectorAt + j + 2];
    s3 += matrix[rowAt + j + 3] * matrix[vectorAt + j + 3];
  }
  for (; j < size; j += 1) s0 += matrix[rowAt + j] * matrix[vectorAt + j];
  return s0 + s1 + (s2 + s3);
}

interface RankTwoRow {
  readonly row: number;
  readonly vectorAt: number;
  readonly from: number;
  readonly v: number;
}

function rankTwoRow(matrix: Float64Array, size: number, { row, vectorAt, from, v }: RankTwoRow, product: Float64Array): void {
  const w = product[row / size];
  for (let j = from; j < size; j += 1) matrix[row + j] -= v * product[j] + w * matrix[vectorAt + j];
}

/** vectors ← Qᵀ vectors (count columns, row-major n × count). */
export function applyTransposed(form: Tridiagonal, vectors: Float64Array, count: number): void {
  for (let k = 0; k < form.size - 1; k += 1) reflect(form, k, vectors, count);
}

/** vectors ← Q vectors. */
export function applyForward(form: Tridiagonal, vectors: Float64Array, count: number): void {
  for (let k = form.size - 2; k >= 0; k -= 1) reflect(form, k, vectors, count);
}

function reflect(form: Tridiagonal, k: number, vectors: Float64Array, count: number): void {
  const { size, reflectors, betas } = form;
  if (betas[k] === 0) return;
  const sums = new Float64Array(count);
  for (let i = k + 1; i < size; i += 1) {
    const v = reflectors[k * size + i];
    const at = i * count;
    for (let j = 0; j < count; j += 1) sums[j] += v * vectors[at + j];
  }
  for (let i = k + 1; i < size; i += 1) {
    const v = betas[k] * reflectors[k * size + i];
    const at = i * count;
    for (let j = 0; j < count; j += 1) vectors[at + j] -= v * sums[j];
  }
}

/** (T + shift·I) x = right by LDLᵀ; T + shift·I must be positive definite. O(n). */
export function solveShifted(form: Tridiagonal, shift: number, right: Float64Array): Float64Array {
  const { size, diagonal, offDiagonal } = form;
  const pivots = new Float64Array(size);
  const solution = right.slice();
  for (let i = 0; i < size; i += 1) {
    pivots[i] = diagonal[i] + shift;
    if (i === 0) continue;
    const factor = offDiagonal[i - 1] / pivots[i - 1];
    pivots[i] -= factor * offDiagonal[i - 1];
    solution[i] -= factor * solution[i - 1];
  }
  for (let i = size - 1; i >= 0; i -= 1) {
    if (i + 1 < size) solution[i] -= offDiagonal[i] * solution[i + 1];
    solution[i] /= pivots[i];
  }
  return solution;
}
