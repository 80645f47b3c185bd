import { EigenvalueDecomposition, Matrix, SingularValueDecomposition } from 'ml-matrix';
import type { StandardisedProblem } from '../design/moments';
import { upper } from '../linear-algebra/householder-qr';
import { tridiagonalise } from '../linear-algebra/tridiagonal';
import { tridiagonalEigenvalues } from '../linear-algebra/tridiagonal-eigenvalues';
import { isWide, type TrainingPart } from '../solvers/solve-path';
import { triangularOf } from './lever';

/** Largest ÷ smallest singular value of the standardised columns at `positions`; null when it is beyond double precision. */
export function conditionNumber(part: TrainingPart, positions: readonly number[]): number | null {
  const size = positions.length;
  if (size === 0) return 1;
  if (isWide(part)) return null;
  const qr = triangularOf(part, positions);
  if (qr === null) return conditionOfGram(part.problem, positions);
  const steps = Math.min(qr.diagonal.length, size);
  if (steps < size) return null;
  const triangle = new Matrix(size, size);
  for (let i = 0; i < size; i += 1) for (let j = i; j < size; j += 1) triangle.set(i, j, upper(qr, i, j));
  const values = new SingularValueDecomposition(triangle, {
    computeLeftSingularVectors: false,
    computeRightSingularVectors: false,
  }).diagonal;
  return ratio(Math.max(...values), Math.min(...values), Number.EPSILON * size);
}

function conditionOfGram(problem: StandardisedProblem, positions: readonly number[]): number | null {
  const size = positions.length;
  const gram = new Float64Array(size * size);
  positions.forEach((row, i) =>
    positions.forEach((column, j) => (gram[i * size + j] = problem.gram[row * problem.size + column])),
  );
  const values = tridiagonalEigenvalues(tridiagonalise(gram, size));
  const squared = ratio(values[size - 1], values[0], Number.EPSILON * size);
  return squared === null ? null : Math.sqrt(squared);
}

function ratio(largest: number, smallest: number, floor: number): number | null {
  return smallest > floor * largest ? largest / smallest : null;
}

/** Eigenvalues (ascending) and vectors of a symmetric matrix given as a function of row and column. */
export function symmetricEigen(
  size: number,
  entry: (row: number, column: number) => number,
): { values: number[]; vectors: Matrix } {
  const matrix = new Matrix(size, size);
  for (let i = 0; i < size; i += 1) for (let j = 0; j < size; j += 1) matrix.set(i, j, entry(i, j));
  const decomposition = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
  return { values: decomposition.realEigenvalues, vectors: decomposition.eigenvectorMatrix };
}
