import { LASSO_PATH_RATIO, PATH_LENGTH, RIDGE_PATH_SHARE } from '../conventions';
import { allowedPull } from '../solvers/held-penalty';
import type { HeldProblem } from '../solvers/project-free';
import type { ColumnPenalties } from '../solvers/column-penalties';
import { degreesOfFreedom, nullFloor, type RidgeForm } from '../solvers/ridge-form';

/** Log-spaced values, strongest first. */
export function logSpaced(strongest: number, weakest: number, count: number = PATH_LENGTH): number[] {
  const from = Math.log(strongest);
  const step = (Math.log(weakest) - from) / (count - 1);
  return Array.from({ length: count }, (_, index) =>
    index === 0 ? strongest : index === count - 1 ? weakest : Math.exp(from + step * index),
  );
}

/** From 1 % to 99.9 % of the degrees of freedom that the held columns have. */
export function ridgePath(form: RidgeForm): number[] {
  const rank = form.eigenvalues.filter((value) => value > nullFloor(form)).length;
  if (rank === 0) return logSpaced(1, 1e-3);
  const at = (share: number): number => penaltyForDegrees(form, form.freeCount + share * rank);
  return logSpaced(at(RIDGE_PATH_SHARE.strongest), at(RIDGE_PATH_SHARE.weakest));
}

/** λ at which the ridge has these degrees of freedom, by bisection of log λ (the trace falls as λ grows). */
export function penaltyForDegrees(form: RidgeForm, degrees: number): number {
  const largest = form.eigenvalues[form.eigenvalues.length - 1];
  let weak = Math.log(largest) - 60;
  let strong = Math.log(largest) + 30;
  for (let round = 0; round < 80; round += 1) {
    const middle = (weak + strong) / 2;
    if (degreesOfFreedom(form, Math.exp(middle)) > degrees) weak = middle;
    else strong = middle;
  }
  return Math.exp((weak + strong) / 2);
}

/** From the smallest λ that zeroes every held weight down to the ratio of the conventions. */
export function lassoPath(
  held: Pick<HeldProblem, 'held' | 'cross'>,
  penalties: ColumnPenalties,
  mixing: number,
  wide: boolean,
): number[] {
  let strongest = 0;
  held.held.forEach((column, j) => {
    const factor = penalties.factors[column];
    if (factor > 0)
      strongest = Math.max(strongest, allowedPull(held.cross[j], penalties.signs[column]) / (mixing * factor));
  });
  const ratio = wide ? LASSO_PATH_RATIO.wide : LASSO_PATH_RATIO.tall;
  return strongest > 0 ? logSpaced(strongest, strongest * ratio) : logSpaced(1, ratio);
}
