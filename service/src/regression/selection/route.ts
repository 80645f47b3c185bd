import { conditionNumber } from '../inference/condition';
import type { SolverKind, TrainingPart } from '../solvers/solve-path';
import type { PenaltyPlan } from './choose-penalty';
import type { DesignMatrix } from '../design/design-matrix';

/**
 * moments: everything from sums of products. orthogonal: QR and SVD of the rows, where that is cheap or where moments would
 * lose digits. wide: many more columns than records, where no columns × columns matrix is formed.
 */
export type Route = 'moments' | 'orthogonal' | 'wide';

/** Multiplications of one orthogonal fit that still count as cheap. */
const CHEAP_ORTHOGONAL = 2e7;

/** Columns per record from which the dual is cheaper. */
const WIDE_RATIO = 1.5;

export function chooseRoute(design: DesignMatrix, kind: SolverKind): Route {
  const columns = design.columns.filter((column) => column.leftOut === undefined).length;
  if (design.rowCount * columns * Math.min(columns, design.rowCount) <= CHEAP_ORTHOGONAL) return 'orthogonal';
  return kind !== 'least-squares' && columns > WIDE_RATIO * design.rowCount ? 'wide' : 'moments';
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
  const condition = conditionNumber(
    part,
    Array.from({ length: part.problem.size }, (_, at) => at),
  );
  return condition === null ? Infinity : condition * condition;
}
