/**
 * Householder QR of a column-major matrix, A = Q R, Q kept as reflectors below the diagonal (Golub and Van Loan 2013,
 * section 5.2.2). Own because ml-matrix has no in-place form on typed arrays and is several times slower on tall matrices.
 */
export interface QrForm {
  readonly rows: number;
  readonly columns: number;
  /** Column-major rows × columns: R on and above the diagonal, reflector k below (its head in `heads`). */
  readonly data: Float64Array;
  readonly heads: Float64Array;
  readonly betas: Float64Array;
  /** R's diagonal; R's other entries stand in `data`. */
  readonly diagonal: Float64Array;
}

/** `data` is overwritten. Cost 2 · rows · columns². */
export function factorise(data: Float64Array, rows: number, columns: number): QrForm {
  const steps = Math.min(rows, columns);
  const heads = new Float64Array(steps);
  const betas = new Float64Array(steps);
  const diagonal = new Float64Array(steps);
  const form = { rows, columns, data, heads, betas, diagonal };
  for (let k = 0; k < steps; k += 1) {
    makeReflector(form, k);
    for (let column = k + 1; column < columns; column += 1) reflectVector(form, k, data, column * rows);
  }
  return form;
}

function makeReflector(form: QrForm, k: number): void {
  const { rows, data, heads, betas, diagonal } = form;
  const at = k * rows;
  let largest = 0;
  for (let row = k; row < rows; row += 1) largest = Math.max(largest, Math.abs(data[at + row]));
  if (largest === 0) return;
  let tail = 0;
  for (let row = k + 1; row < rows; row += 1) tail += (data[at + row] / largest) ** 2;
  const head = data[at + k] / largest;
  const norm = Math.sqrt(head * head + tail);
  const alpha = head > 0 ? -norm : norm;
  heads[k] = (head - alpha) * largest;
  betas[k] = 2 / ((heads[k] / largest) ** 2 + tail) / largest / largest;
  diagonal[k] = alpha * largest;
}

/** vector ← H_k vector, for the vector that starts at `at`. */
function reflectVector(form: QrForm, k: number, vector: Float64Array, at: number): void {
  const { rows, data, heads, betas } = form;
  if (betas[k] === 0) return;
  const reflectorAt = k * rows;
  let sum = heads[k] * vector[at + k];
  for (let row = k + 1; row < rows; row += 1) sum += data[reflectorAt + row] * vector[at + row];
  sum *= betas[k];
  vector[at + k] -= sum * heads[k];
  for (let row = k + 1; row < rows; row += 1) vector[at + row] -= sum * data[reflectorAt + row];
}

/** vector ← Qᵀ vector, in place. */
export function multiplyTransposed(form: QrForm, vector: Float64Array): void {
  for (let k = 0; k < form.betas.length; k += 1) reflectVector(form, k, vector, 0);
}

/** vector ← Q vector, in place. */
export function multiplyForward(form: QrForm, vector: Float64Array): void {
  for (let k = form.betas.length - 1; k >= 0; k -= 1) reflectVector(form, k, vector, 0);
}

/** Entry of R. */
export function upper(form: QrForm, row: number, column: number): number {
  if (row === column) return form.diagonal[row];
  return row < column ? form.data[column * form.rows + row] : 0;
}

/** x with R x = right on the leading `size` columns. */
export function solveUpper(form: QrForm, right: Float64Array, size: number): Float64Array {
  const solution = right.slice(0, size);
  for (let row = size - 1; row >= 0; row -= 1) {
    for (let column = row + 1; column < size; column += 1) solution[row] -= upper(form, row, column) * solution[column];
    solution[row] /= form.diagonal[row];
  }
  return solution;
}

/** x with Rᵀ x = right on the leading `size` columns. */
export function solveUpperTransposed(form: QrForm, right: Float64Array, size: number): Float64Array {
  const solution = right.slice(0, size);
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column < row; column += 1) solution[row] -= upper(form, column, row) * solution[column];
    solution[row] /= form.diagonal[row];
  }
  return solution;
}
