import type { StandardisedProblem } from '../design/moments';
import { applyForward, applyTransposed, solveShifted, tridiagonalise } from '../linear-algebra/tridiagonal';
import { tridiagonalEigenvalues } from '../linear-algebra/tridiagonal-eigenvalues';
import type { ColumnPenalties } from './column-penalties';
import { projectFree } from './project-free';
import type { RidgeForm } from './ridge-form';

/** Ridge from sums of products: one tridiagonal reduction serves every λ. Cost 4/3 p³ + O(p²) a λ. */
export function ridgeFromMoments(problem: StandardisedProblem, penalties: ColumnPenalties): RidgeForm {
  const held = projectFree(problem, penalties);
  const { size } = held;
  const inverseRoots = Float64Array.from(held.held, (column) => 1 / Math.sqrt(penalties.factors[column]));
  const matrix = held.gram.slice();
  for (let i = 0; i < size; i += 1)
    for (let j = 0; j < size; j += 1) matrix[i * size + j] *= inverseRoots[i] * inverseRoots[j];
  const scaledCross = held.cross.map((value, index) => value * inverseRoots[index]);
  const form = tridiagonalise(matrix, size);
  const rotated = scaledCross.slice();
  applyTransposed(form, rotated, 1);
  return {
    freeCount: held.freeCount,
    eigenvalues: tridiagonalEigenvalues(form).map((value) => Math.max(0, value)),
    targetSquare: held.targetSquare,
    weights: (lambdas) => {
      const count = lambdas.length;
      const solved = new Float64Array(size * count);
      lambdas.forEach((lambda, at) =>
        solveShifted(form, lambda, rotated).forEach((value, row) => (solved[row * count + at] = value)),
      );
      applyForward(form, solved, count);
      return lambdas.map((_, at) => held.restore(inverseRoots.map((root, row) => root * solved[row * count + at])));
    },
    parts: (lambda) => {
      const solved = solveShifted(form, lambda, rotated);
      let explained = 0;
      let penaltySquare = 0;
      solved.forEach((value, row) => {
        explained += value * rotated[row];
        penaltySquare += value * value;
      });
      return { residualSquare: Math.max(0, held.targetSquare - explained - lambda * penaltySquare), penaltySquare };
    },
  };
}
