import type { DesignColumn } from '../design/design-matrix';
import type { StandardisedProblem } from '../design/moments';
import type { StandardisedRows } from '../design/standardised-rows';
import { RegressionError } from '../errors';
import { penaltiesOf, type ColumnPenalties } from './column-penalties';
import { descend, startingState } from './coordinate-descent';
import { descendWide } from './descent-wide';
import { penaltyAt, type HeldPenalty } from './held-penalty';
import { leastSquaresFromMoments, leastSquaresFromRows, type LeastSquaresAnswer } from './least-squares';
import { projectFree, type HeldProblem } from './project-free';
import { degreesOfFreedom, type RidgeForm } from './ridge-form';
import { ridgeFromDual } from './ridge-dual';
import { ridgeFromMoments } from './ridge-moments';
import { ridgeFromRows } from './ridge-orthogonal';
import { activeDegrees } from './active-degrees';

/** Which solver a method and its limits need. */
export type SolverKind = 'least-squares' | 'ridge' | 'descent';

export interface SolverSettings {
  readonly kind: SolverKind;
  /** α of the objective. */
  readonly mixing: number;
  /** Solve exactly on the active set at every λ (the final fit), or only where descent is slow (folds). */
  readonly polish: boolean;
}

/** The training records in the form that the route needs; rows are null on the route by moments. */
export interface TrainingPart {
  readonly problem: StandardisedProblem;
  readonly rows: StandardisedRows | null;
}

/** One solution a λ: standardised weights of the kept columns. */
export interface PathSolution {
  readonly weights: readonly Float64Array[];
  readonly degreesOfFreedom: readonly number[];
  readonly gaps: readonly number[];
  readonly iterations: number;
  readonly converged: boolean;
  /** Positions among the kept columns, least squares only. */
  readonly dependent: readonly number[];
}

export function solverKind(method: string, columns: readonly DesignColumn[]): SolverKind {
  const limited = columns.some((column) => column.sign !== 'any');
  if (method === 'lasso' || method === 'elastic-net' || limited) return 'descent';
  return method === 'ridge' ? 'ridge' : 'least-squares';
}

/** Solves for every λ, strongest first. */
export function solvePath(
  part: TrainingPart,
  columns: readonly DesignColumn[],
  settings: SolverSettings,
  lambdas: readonly number[],
): PathSolution {
  const penalties = penaltiesOf(columns, part.problem.kept);
  if (settings.kind === 'least-squares') return solveLeastSquares(part, lambdas);
  if (settings.kind === 'ridge') return solveRidge(ridgeForm(part, penalties), lambdas);
  if (part.rows !== null && isWide(part)) return descendWide(part.rows, penalties, settings, lambdas);
  return solveDescent(part.problem, penalties, settings, lambdas);
}

export function ridgeForm(part: TrainingPart, penalties: ColumnPenalties): RidgeForm {
  if (part.rows === null) return ridgeFromMoments(part.problem, penalties);
  return isWide(part) ? ridgeFromDual(part.rows, penalties) : ridgeFromRows(part.rows, penalties);
}

/** Whether the part has columns but no products of them. */
export function isWide({ problem }: TrainingPart): boolean {
  return problem.size > 0 && problem.gram.length === 0;
}

function solveLeastSquares(part: TrainingPart, lambdas: readonly number[]): PathSolution {
  const answer: LeastSquaresAnswer =
    part.rows === null ? leastSquaresFromMoments(part.problem) : leastSquaresFromRows(part.rows);
  return {
    weights: lambdas.map(() => answer.weights),
    degreesOfFreedom: lambdas.map(() => part.problem.size - answer.dependent.length),
    gaps: lambdas.map(() => 0),
    iterations: answer.iterations,
    converged: true,
    dependent: answer.dependent,
  };
}

export function solveRidge(form: RidgeForm, lambdas: readonly number[]): PathSolution {
  const smallest = form.eigenvalues.length === 0 ? 1 : form.eigenvalues[0];
  const floor = Number.EPSILON * form.eigenvalues.length * (form.eigenvalues[form.eigenvalues.length - 1] ?? 0);
  if (lambdas.includes(0) && smallest <= floor) {
    throw new RegressionError(
      'not-identifiable',
      'With penalty 0 the inputs depend on each other exactly, so no single set of weights exists. Choose a penalty above 0.',
    );
  }
  return {
    weights: form.weights(lambdas),
    degreesOfFreedom: lambdas.map((lambda) => degreesOfFreedom(form, lambda)),
    gaps: lambdas.map(() => 0),
    iterations: 0,
    converged: true,
    dependent: [],
  };
}

function solveDescent(
  problem: StandardisedProblem,
  penalties: ColumnPenalties,
  settings: SolverSettings,
  lambdas: readonly number[],
): PathSolution {
  const held = projectFree(problem, penalties);
  return descendPath(held, penalties, settings, lambdas);
}

/** Warm starts from one λ to the next. */
export function descendPath(
  held: HeldProblem,
  penalties: ColumnPenalties,
  settings: SolverSettings,
  lambdas: readonly number[],
): PathSolution {
  const state = startingState(held);
  let previous: HeldPenalty | null = null;
  const weights: Float64Array[] = [];
  const degrees: number[] = [];
  const gaps: number[] = [];
  let iterations = 0;
  let converged = true;
  for (const lambda of lambdas) {
    const penalty = penaltyAt(held, penalties, settings.mixing, lambda);
    const answer = descend(held, penalty, previous, state, settings.polish);
    weights.push(held.restore(answer.weights));
    if (settings.polish) degrees.push(held.freeCount + activeDegrees(held, penalty, answer.weights));
    gaps.push(answer.gap);
    iterations += answer.iterations;
    converged &&= answer.converged;
    previous = penalty;
  }
  return { weights, degreesOfFreedom: degrees, gaps, iterations, converged, dependent: [] };
}
