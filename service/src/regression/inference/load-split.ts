import type { StandardisedProblem } from '../design/moments';
import type { FinishedFit } from '../fit-result';
import type { SharedLoadGroup } from '../result';
import { generalisedErrors } from '../selection/choose-penalty';
import { smallestError } from '../selection/cross-validation';
import { lassoPath, ridgePath } from '../selection/penalty-path';
import { penaltiesOf, type ColumnPenalties } from '../solvers/column-penalties';
import { leastSquaresFromMoments } from '../solvers/least-squares';
import { projectFree } from '../solvers/project-free';
import { ridgeFromMoments } from '../solvers/ridge-moments';
import { descendPath, isWide } from '../solvers/solve-path';
import { findSharedLoad } from './shared-load';

const MOST_INPUTS = 150;
const MOST_COLUMNS = 300;

/**
 * For every group of inputs that share a load: how least squares, ridge (penalty by generalised cross-validation) and lasso
 * (penalty by the Bayesian information criterion) split it. A member's share is its standardised weight; for an input of several
 * columns the standard deviation of its contribution. Penalty factors and sign limits are set aside for the comparison.
 */
export function sharedLoad(fit: FinishedFit): SharedLoadGroup[] {
  const { context, part } = fit;
  const { problem } = part;
  const inputs = context.specification.inputs.flatMap((input, at) => {
    const positions = Array.from(problem.kept.keys()).filter(
      (position) => context.design.columns[problem.kept[position]].input === at,
    );
    return positions.length === 0 ? [] : [{ name: input.column, positions }];
  });
  if (inputs.length > MOST_INPUTS || problem.size > MOST_COLUMNS || isWide(part)) return [];
  const groups = findSharedLoad({ gram: problem.gram, size: problem.size, inputs });
  if (groups.length === 0) return [];
  const splits = solveThreeWays(fit);
  const share = (weights: Float64Array, member: number): number =>
    memberShare(problem, weights, inputs[member].positions);
  return groups.map(({ members, ...group }) => ({
    ...group,
    members: members.map((member) => ({ input: inputs[member].name })),
    leastSquares:
      splits.leastSquares === null ? null : members.map((member) => share(splits.leastSquares ?? splits.ridge, member)),
    ridge: members.map((member) => share(splits.ridge, member)),
    lasso: members.map((member) => share(splits.lasso, member)),
  }));
}

function memberShare({ gram, size }: StandardisedProblem, weights: Float64Array, positions: readonly number[]): number {
  if (positions.length === 1) return weights[positions[0]];
  let square = 0;
  for (const row of positions)
    for (const column of positions) square += weights[row] * weights[column] * gram[row * size + column];
  return Math.sqrt(Math.max(0, square));
}

interface ThreeWays {
  readonly leastSquares: Float64Array | null;
  readonly ridge: Float64Array;
  readonly lasso: Float64Array;
}

function solveThreeWays({ context, part }: FinishedFit): ThreeWays {
  const { problem } = part;
  const plain: ColumnPenalties = {
    factors: new Float64Array(problem.size).fill(1),
    signs: penaltiesOf(context.design.columns, problem.kept).signs.map(() => 'any'),
  };
  const answer = leastSquaresFromMoments(problem);
  const form = ridgeFromMoments(problem, plain);
  const lambdas = ridgePath(form);
  const best = smallestError(generalisedErrors(form, problem.weightSum, context.specification.intercept, lambdas));
  return {
    leastSquares: answer.dependent.length > 0 ? null : answer.weights,
    ridge: form.weights([lambdas[best]])[0],
    lasso: lassoByInformation(problem, plain),
  };
}

/** n ln(RSS/n) + df ln n along the path (Schwarz 1978; Zou, Hastie and Tibshirani 2007). */
function lassoByInformation(problem: StandardisedProblem, plain: ColumnPenalties): Float64Array {
  const held = projectFree(problem, plain);
  const { weights, degreesOfFreedom } = descendPath(
    held,
    plain,
    { kind: 'descent', mixing: 1, polish: true },
    lassoPath(held, plain, 1, false),
  );
  const criterion = weights.map((solution, at) => {
    let residual = problem.targetSquare;
    for (let i = 0; i < problem.size; i += 1) {
      if (solution[i] === 0) continue;
      let fitted = 0;
      for (let j = 0; j < problem.size; j += 1) fitted += problem.gram[i * problem.size + j] * solution[j];
      residual += solution[i] * (fitted - 2 * problem.cross[i]);
    }
    return (
      problem.weightSum * Math.log(Math.max(residual, Number.MIN_VALUE)) +
      degreesOfFreedom[at] * Math.log(problem.weightSum)
    );
  });
  return weights[smallestError(criterion)];
}
