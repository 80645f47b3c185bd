import { seededRandom } from '../random';
import { cholesky, invertCholesky, solveCholesky } from './cholesky';
import { crossProduct } from './cross-product';
import { LongSum } from './double-double';
import { applyForward, applyTransposed, solveShifted, tridiagonalise } from './tridiagonal';
import { tridiagonalEigenvalues } from './tridiagonal-eigenvalues';
import { UpdatedCholesky } from './updated-cholesky';

const SIZE = 9;
const random = seededRandom(5);
const tall = Float64Array.from({ length: 40 * SIZE }, () => random() - 0.5);
/** Positive definite: sums of products of tall random columns. */
const matrix = crossProduct(tall, SIZE, { rowCount: 40, start: 0, end: 40 });
const right = Float64Array.from({ length: SIZE }, () => random() - 0.5);

function multiply(values: Float64Array, vector: ArrayLike<number>): number[] {
  return Array.from({ length: SIZE }, (_, row) =>
    Array.from(vector).reduce((sum, value, column) => sum + values[row * SIZE + column] * value, 0),
  );
}

const close = (values: ArrayLike<number>): unknown[] => Array.from(values, (value) => expect.closeTo(value, 12));

describe('sums of products', () => {
  it.each([
    [0, 40],
    [3, 29],
  ])('are those of the rows %d to %d, tile edges included', (start, end) => {
    const sums = crossProduct(tall, SIZE, { rowCount: 40, start, end });
    for (let i = 0; i < SIZE; i += 1) {
      for (let j = 0; j < SIZE; j += 1) {
        let expected = 0;
        for (let row = start; row < end; row += 1) expected += tall[i * 40 + row] * tall[j * 40 + row];
        expect(sums[i * SIZE + j]).toBeCloseTo(expected, 13);
      }
    }
  });
});

describe('Cholesky', () => {
  it('solves and inverts', () => {
    const factor = cholesky(matrix, SIZE);
    expect(multiply(matrix, solveCholesky(factor, right))).toEqual(close(right));
    const inverse = invertCholesky(factor);
    expect(multiply(inverse, multiply(matrix, right))).toEqual(close(right));
  });

  it('names the first column that depends on those before it', () => {
    const dependent = matrix.slice();
    for (let k = 0; k < SIZE; k += 1) dependent[6 * SIZE + k] = dependent[2 * SIZE + k];
    for (let k = 0; k < SIZE; k += 1) dependent[k * SIZE + 6] = dependent[k * SIZE + 2];
    expect(cholesky(dependent, SIZE).dependent).toBe(6);
  });
});

describe('an updated Cholesky factor', () => {
  const productsOf = (columns: readonly number[], column: number): number[] =>
    columns.map((other) => matrix[column * SIZE + other]);

  it('solves as a fresh one after columns have joined and left', () => {
    const factor = new UpdatedCholesky();
    let columns: number[] = [];
    const join = (column: number): void => {
      expect(factor.append(productsOf(columns, column), matrix[column * SIZE + column])).toBe(true);
      columns.push(column);
    };
    [4, 0, 7, 2, 8, 1].forEach(join);
    for (const leaving of [2, 0, 3]) {
      factor.remove(leaving);
      columns = columns.filter((_, at) => at !== leaving);
    }
    join(5);
    const wanted = columns.map((column) => right[column]);
    const solved = factor.solve(wanted);
    columns.forEach((row, at) => {
      const sum = columns.reduce((total, column, k) => total + matrix[row * SIZE + column] * solved[k], 0);
      expect(sum).toBeCloseTo(wanted[at], 12);
    });
  });

  it('refuses a column that depends on those inside', () => {
    const factor = new UpdatedCholesky();
    factor.append([], matrix[0]);
    expect(factor.append([matrix[0]], matrix[0])).toBe(false);
    expect(factor.size).toBe(1);
  });
});

describe('the tridiagonal form', () => {
  const form = tridiagonalise(matrix.slice(), SIZE);

  it('solves (A + λI) x = c', () => {
    const solution = right.slice();
    applyTransposed(form, solution, 1);
    const solved = solveShifted(form, 0.3, solution);
    applyForward(form, solved, 1);
    expect(multiply(matrix, solved).map((value, at) => value + 0.3 * solved[at])).toEqual(close(right));
  });

  it('has eigenvalues with the trace and the determinant of the matrix', () => {
    const values = tridiagonalEigenvalues(form);
    const trace = Array.from({ length: SIZE }, (_, at) => matrix[at * SIZE + at]).reduce(
      (sum, value) => sum + value,
      0,
    );
    const { lower } = cholesky(matrix, SIZE);
    const logDeterminant = Array.from({ length: SIZE }, (_, at) => 2 * Math.log(lower[at * SIZE + at])).reduce(
      (sum, value) => sum + value,
      0,
    );
    expect(values.reduce((sum, value) => sum + value, 0)).toBeCloseTo(trace, 12);
    expect(values.reduce((sum, value) => sum + Math.log(value), 0)).toBeCloseTo(logDeterminant, 11);
  });
});

describe('a long sum', () => {
  it('keeps what ordinary addition loses', () => {
    const sum = new LongSum();
    [1e16, 1, -1e16].forEach((value) => sum.add(value));
    expect(sum.value()).toBe(1);
  });

  it('keeps the rounding of a product', () => {
    const sum = new LongSum();
    sum.addProduct(1 + 2 ** -30, 1 + 2 ** -30);
    sum.add(-1);
    sum.add(-(2 ** -29));
    expect(sum.value()).toBe(2 ** -60);
  });
});
