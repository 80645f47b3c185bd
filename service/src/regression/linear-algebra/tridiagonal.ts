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

/** The last reflection, not yet applied to the trailing block: A ← A − v wᵀ − w vᵀ. */
interface Pending {
  readonly v: Float64Array;
  readonly w: Float64Array;
}

/**
 * `matrix` (row-major, symmetric; only its lower triangle is used) is overwritten. Each step applies the reflection before and
 * multiplies by the new one in a single pass over the lower triangle, so that memory is read once. Cost 4/3 n³.
 */
export function tridiagonalise(matrix: Float64Array, size: number): Tridiagonal {
  const diagonal = new Float64Array(size);
  const offDiagonal = new Float64Array(size);
  const betas = new Float64Array(size);
  let pending: Pending = { v: new Float64Array(size), w: new Float64Array(size) };
  for (let k = 0; k < size; k += 1) {
    updateColumn(matrix, size, k, pending);
    diagonal[k] = matrix[k * size + k];
    if (k === size - 1) break;
    const v = new Float64Array(size);
    for (let i = k + 1; i < size; i += 1) v[i] = matrix[i * size + k];
    [betas[k], offDiagonal[k]] = makeReflector(v, k + 1, size);
    // Row k right of the diagonal is not used again: it keeps the reflector.
    matrix.set(v.subarray(k + 1), k * size + k + 1);
    const product = updateAndMultiply(matrix, size, k + 1, pending, v);
    pending = { v, w: halfStep(product, v, betas[k], k + 1, size) };
    if (betas[k] === 0) pending = { v: new Float64Array(size), w: new Float64Array(size) };
  }
  return { size, diagonal, offDiagonal, reflectors: matrix, betas };
}

/** Column k of the trailing block with the pending reflection applied. */
function updateColumn(matrix: Float64Array, size: number, k: number, { v, w }: Pending): void {
  for (let i = k; i < size; i += 1) matrix[i * size + k] -= v[i] * w[k] + w[i] * v[k];
}

/** Turns vector[from…] into v with (I − βvvᵀ) vector = (α, 0, …); returns β and α. */
function makeReflector(vector: Float64Array, from: number, size: number): [number, number] {
  let largest = 0;
  for (let j = from; j < size; j += 1) largest = Math.max(largest, Math.abs(vector[j]));
  if (largest === 0) return [0, 0];
  let tail = 0;
  for (let j = from + 1; j < size; j += 1) tail += (vector[j] / largest) ** 2;
  if (tail === 0) return [0, vector[from]];
  const head = vector[from] / largest;
  const norm = Math.sqrt(head * head + tail);
  const alpha = head > 0 ? -norm : norm;
  vector[from] = head - alpha;
  for (let j = from + 1; j < size; j += 1) vector[j] /= largest;
  return [2 / ((head - alpha) ** 2 + tail), alpha * largest];
}

/** A ← A − v wᵀ − w vᵀ on the block from `from` on, and A·next in the same pass; two rows at a time. */
function updateAndMultiply(
  matrix: Float64Array,
  size: number,
  from: number,
  { v, w }: Pending,
  next: Float64Array,
): Float64Array {
  const product = new Float64Array(size);
  let i = from;
  for (; i + 1 < size; i += 2) {
    updateRowPair(matrix, size, i, from, v, w, next, product);
  }
  if (i < size) updateRow(matrix, size, i, from, v, w, next, product);
  return product;
}

function updateRow(
  matrix: Float64Array,
  size: number,
  i: number,
  from: number,
  v: Float64Array,
  w: Float64Array,
  next: Float64Array,
  product: Float64Array,
): void {
  const at = i * size;
  const vi = v[i],
    wi = w[i],
    ni = next[i];
  let sum = 0;
  for (let j = from; j < i; j += 1) {
    const value = matrix[at + j] - (vi * w[j] + wi * v[j]);
    matrix[at + j] = value;
    sum += value * next[j];
    product[j] += value * ni;
  }
  const value = matrix[at + i] - 2 * vi * wi;
  matrix[at + i] = value;
  product[i] += sum + value * ni;
}

function updateRowPair(
  matrix: Float64Array,
  size: number,
  i: number,
  from: number,
  v: Float64Array,
  w: Float64Array,
  next: Float64Array,
  product: Float64Array,
): void {
  const first = i * size,
    second = first + size;
  const v0 = v[i],
    w0 = w[i],
    n0 = next[i],
    v1 = v[i + 1],
    w1 = w[i + 1],
    n1 = next[i + 1];
  let s0 = 0,
    s1 = 0;
  for (let j = from; j < i; j += 1) {
    const vj = v[j],
      wj = w[j],
      nj = next[j];
    const a = matrix[first + j] - (v0 * wj + w0 * vj);
    const b = matrix[second + j] - (v1 * wj + w1 * vj);
    matrix[first + j] = a;
    matrix[second + j] = b;
    s0 += a * nj;
    s1 += b * nj;
    product[j] += a * n0 + b * n1;
  }
  const corner = matrix[first + i] - 2 * v0 * w0;
  const below = matrix[second + i] - (v1 * w0 + w1 * v0);
  const last = matrix[second + i + 1] - 2 * v1 * w1;
  matrix[first + i] = corner;
  matrix[second + i] = below;
  matrix[second + i + 1] = last;
  product[i] += s0 + corner * n0 + below * n1;
  product[i + 1] += s1 + below * n0 + last * n1;
}

/** w = βp − (β² pᵀv / 2) v. */
function halfStep(product: Float64Array, v: Float64Array, beta: number, from: number, size: number): Float64Array {
  const w = new Float64Array(size);
  let inner = 0;
  for (let i = from; i < size; i += 1) inner += product[i] * v[i];
  const half = (beta * beta * inner) / 2;
  for (let i = from; i < size; i += 1) w[i] = beta * product[i] - half * v[i];
  return w;
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
