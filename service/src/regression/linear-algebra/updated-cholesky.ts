/**
 * A Cholesky factor A = L Lᵀ that rows and columns can join and leave at O(n²) each (Golub and Van Loan 2013, section 6.5;
 * deletion by Givens rotations). L is kept as rows of growing length.
 */
export class UpdatedCholesky {
  private readonly rows: Float64Array[] = [];

  get size(): number {
    return this.rows.length;
  }

  /**
   * Adds a last row. `column` holds its products with the columns already in; `diagonal` its own. Returns false, and changes
   * nothing, when it depends on them: its pivot is at or below `dependentShare` of its diagonal.
   */
  append(column: ArrayLike<number>, diagonal: number, dependentShare = 1e-12): boolean {
    const size = this.rows.length;
    const row = new Float64Array(size + 1);
    let square = 0;
    for (let i = 0; i < size; i += 1) {
      row[i] = (column[i] - innerProduct(this.rows[i], row, i)) / this.rows[i][i];
      square += row[i] * row[i];
    }
    const pivot = diagonal - square;
    if (!(pivot > dependentShare * diagonal)) return false;
    row[size] = Math.sqrt(pivot);
    this.rows.push(row);
    return true;
  }

  remove(index: number): void {
    this.rows.splice(index, 1);
    for (let k = index; k < this.rows.length; k += 1) this.rotate(k);
    for (let i = index; i < this.rows.length; i += 1) this.rows[i] = this.rows[i].slice(0, i + 1);
  }

  /** Zeroes entry (k, k + 1), which a removed row has left behind. */
  private rotate(k: number): void {
    const first = this.rows[k];
    const length = Math.hypot(first[k], first[k + 1]);
    const cosine = first[k] / length;
    const sine = first[k + 1] / length;
    for (let i = k; i < this.rows.length; i += 1) {
      const row = this.rows[i];
      const before = row[k];
      row[k] = cosine * before + sine * row[k + 1];
      row[k + 1] = cosine * row[k + 1] - sine * before;
    }
  }

  /** x with A x = right on the leading `count` rows and columns. */
  solve(right: ArrayLike<number>, count: number = this.rows.length): Float64Array {
    const solution = new Float64Array(count);
    for (let i = 0; i < count; i += 1)
      solution[i] = (right[i] - innerProduct(this.rows[i], solution, i)) / this.rows[i][i];
    for (let i = count - 1; i >= 0; i -= 1) {
      const row = this.rows[i];
      solution[i] /= row[i];
      const value = solution[i];
      for (let k = 0; k < i; k += 1) solution[k] -= row[k] * value;
    }
    return solution;
  }
}

function innerProduct(first: Float64Array, second: Float64Array, count: number): number {
  let s0 = 0,
    s1 = 0,
    s2 = 0,
    s3 = 0;
  let k = 0;
  for (; k + 3 < count; k += 4) {
    s0 += first[k] * second[k];
    s1 += first[k + 1] * second[k + 1];
    s2 += first[k + 2] * second[k + 2];
    s3 += first[k + 3] * second[k + 3];
  }
  for (; k < count; k += 1) s0 += first[k] * second[k];
  return s0 + s1 + (s2 + s3);
}
