import type { TrainingPart, SolverKind } from '../solvers/solve-path';
import { penaltiesOf, type ColumnPenalties } from '../solvers/column-penalties';
import { projectFree } from '../solvers/project-free';
import { isWide, ridgeForm } from '../solvers/solve-path';
import { wideProblem } from '../solvers/wide-problem';
import { degreesOfFreedom, type RidgeForm } from '../solvers/ridge-form';
import type { DesignColumn } from '../design/design-matrix';
import type { ResolvedSpecification } from '../design/resolve-specification';
import { evidenceForPrior, maximiseEvidence, type EvidenceAnswer } from '../inference/evidence';
import { lassoPath, ridgePath } from './penalty-path';

/** What the full records say about the penalty before any fold is run. */
export interface PenaltyPlan {
  /** Strongest first; holds the value that a rule without folds has chosen. */
  readonly lambdas: readonly number[];
  /** λ that the rule has chosen already: fixed, prior, evidence. */
  readonly settled: number | null;
  readonly form: RidgeForm | null;
  readonly penalties: ColumnPenalties;
  readonly evidence: EvidenceAnswer | null;
}

export function planPenalty(
  part: TrainingPart,
  columns: readonly DesignColumn[],
  specification: ResolvedSpecification,
  kind: SolverKind,
): PenaltyPlan {
  const penalties = penaltiesOf(columns, part.problem.kept);
  if (kind === 'least-squares') return { lambdas: [0], settled: 0, form: null, penalties, evidence: null };
  if (specification.method === 'least-squares')
    return { lambdas: [0], settled: 0, form: null, penalties, evidence: null };
  const limitless = { ...penalties, signs: penalties.signs.map(() => 'any' as const) };
  const form = specification.method === 'ridge' ? ridgeForm(part, limitless) : null;
  const grid = form === null ? descentGrid(part, penalties, specification) : ridgePath(form);
  const evidence = form === null ? null : evidenceOf(form, part, specification, grid);
  const settled = settledPenalty(specification, evidence);
  return { lambdas: withValue(grid, settled), settled, form, penalties, evidence };
}

function descentGrid(part: TrainingPart, penalties: ColumnPenalties, specification: ResolvedSpecification): number[] {
  const held =
    part.rows !== null && isWide(part) ? wideProblem(part.rows, penalties) : projectFree(part.problem, penalties);
  return lassoPath(held, penalties, specification.mixing, part.problem.size >= part.problem.weightSum);
}

function evidenceOf(
  form: RidgeForm,
  part: TrainingPart,
  specification: ResolvedSpecification,
  grid: readonly number[],
): EvidenceAnswer | null {
  const setting = { records: part.problem.weightSum, flat: form.freeCount + (specification.intercept ? 1 : 0) };
  if (setting.records - setting.flat <= 0 || form.targetSquare === 0 || form.eigenvalues.length === 0) return null;
  const { rule, value } = specification.penalty;
  if (rule === 'prior' && value !== undefined) return evidenceForPrior(form, setting, value);
  return maximiseEvidence(form, setting, { strongest: grid[0] * 1e3, weakest: grid[grid.length - 1] * 1e-3 });
}

function settledPenalty(specification: ResolvedSpecification, evidence: EvidenceAnswer | null): number | null {
  const { rule, value } = specification.penalty;
  if (rule === 'fixed') return value ?? 0;
  return (rule === 'evidence' || rule === 'prior') && evidence !== null ? evidence.lambda : null;
}

function withValue(grid: readonly number[], value: number | null): number[] {
  if (value === null || grid.includes(value)) return [...grid];
  return [...grid, value].sort((first, second) => second - first);
}

/** n · RSS / (n − 1 − df)², the intercept counted (Golub, Heath and Wahba 1979). */
export function generalisedErrors(
  form: RidgeForm,
  records: number,
  intercept: boolean,
  lambdas: readonly number[],
): number[] {
  return lambdas.map((lambda) => {
    const left = 1 - (degreesOfFreedom(form, lambda) + (intercept ? 1 : 0)) / records;
    return left > 0 ? form.parts(lambda).residualSquare / (left * left) : Number.MAX_VALUE;
  });
}
