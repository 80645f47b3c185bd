import { conditionNumber } from '../inference/condition';
import type { SolverKind, TrainingPart } from '../solvers/solve-path';
import type { PenaltyPlan } from './choose-penalty';
import type { DesignMatrix } from '../design/design-matrix';

/**
 * moments: everything from sums of products. orthogonal: QR and SVD of the rows, where that is cheap or where moments would
 * lose digits.
 */
export type Route = 'moments' | 'orthogonal';

/** Multiplications of one orthogonal fit that still count as cheap. */
const CHEAP_ORTHOGONAL = 2e7;

export function chooseRoute(design: DesignMatrix): Route {
  const columns = design.columns.filter((column) => column.leftOut === undefined).length;
  return design.rowCount * columns * Math.min(columns, design.rowCount) <= CHEAP_ORTHOGONAL ? 'orthogonal' : 'moments';
}

/** Beyond this ratio of largest to smallest penalised eigenvalue a solution from moments keeps fewer than about eight digits. */
const SAFE_RATIO = 1e8;
/** Above this many multiplications the orthogonal route is not taken even then; the report warns. */
const MOST_ORTHOGONAL = 3e10;

export function losesDigits(part: TrainingPart, plan: PenaltyPlan, kind: SolverKind): boolean {
  const { size, weightSum } = part.problem;
  if (weightSum * size * size > MOST_ORTHOGONAL) return false;
  if (kind === 'least-squares') return squaredCondition(part) > SAFE_RATIO;
  if (kind !== 'ridge' || plan.form === null || plan.form.eigenvalues.length === 0) return false;
  const { eigenvalues } = plan.form;
  const weakest = plan.lambdas[plan.lambdas.length - 1];
  return (eigenvalues[eigenvalues.length - 1] + weakest) / (eigenvalues[0] + weakest) > SAFE_RATIO;
}

function squaredCondition(part: TrainingPart): number {
  const condition = conditionNumber(part, Array.from({ length: part.problem.size }, (_, at) => at));
  return condition === null ? Infinity : condition * condition;
}
