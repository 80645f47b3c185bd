import type { StandardisedProblem } from '../design/moments';
import type { StandardisedRows } from '../design/standardised-rows';
import { cholesky, solveCholesky } from '../linear-algebra/cholesky';
import { refinedLeastSquares } from './refined-least-squares';

/** What to do with a column that is a combination of others: report it, or leave it out (inside folds). */
export interface LeastSquaresAnswer {
  /** Standardised weights of the kept columns; 0 for a dependent one. */
  readonly weights: Float64Array;
  /** Positions of dependent columns among the kept ones. */
  readonly dependent: readonly number[];
  readonly iterations: number;
}

/** Normal equations S b = c on standardised columns; dependent columns get 0. Cost p³/3. */
export function leastSquaresFromMoments(problem: StandardisedProblem): LeastSquaresAnswer {
  const { positions, dependent } = independentPositions(problem);
  const size = positions.length;
  const factor = cholesky(subGram(problem, positions), size);
  const solved = solveCholesky(
    factor,
    positions.map((position) => problem.cross[position]),
  );
  const weights = new Float64Array(problem.size);
  positions.forEach((position, index) => (weights[position] = solved[index]));
  return { weights, dependent, iterations: 0 };
}

/** Columns in order, each kept unless it depends on those before it. */
function independentPositions(problem: StandardisedProblem): { positions: number[]; dependent: number[] } {
  let positions = Array.from({ length: problem.size }, (_, position) => position);
  const dependent: number[] = [];
  for (;;) {
    const factor = cholesky(subGram(problem, positions), positions.length);
    if (factor.dependent < 0) return { positions, dependent };
    dependent.push(positions[factor.dependent]);
    positions = positions.filter((_, index) => index !== factor.dependent);
  }
}

function subGram(problem: StandardisedProblem, positions: readonly number[]): Float64Array {
  const size = positions.length;
  const gram = new Float64Array(size * size);
  positions.forEach((row, i) =>
    positions.forEach((column, j) => (gram[i * size + j] = problem.gram[row * problem.size + column])),
  );
  return gram;
}

/** QR of the rows with refinement. Cost 2 n p² + O(n p) a round. */
export function leastSquaresFromRows(rows: StandardisedRows): LeastSquaresAnswer {
  return refinedLeastSquares(rows.x, rows.rowCount, rows.problem.size, rows.y);
}
