import type { PathAnswer } from './fold-task';

export interface CrossValidation {
  readonly errors: readonly number[];
  readonly standardErrors: readonly number[];
}

/**
 * Error: mean squared held-out error, folds weighted by their weight W: Σ_k W_k m_k / Σ W_k with m_k the fold's own mean.
 * Standard error: √(Σ W_k (m_k − error)² / Σ W_k / (K − 1)), as glmnet has it.
 */
export function combineFolds(answers: readonly PathAnswer[], pathLength: number): CrossValidation {
  const total = answers.reduce((sum, answer) => sum + answer.heldOutWeight, 0);
  const errors: number[] = [];
  const standardErrors: number[] = [];
  for (let at = 0; at < pathLength; at += 1) {
    const error = answers.reduce((sum, answer) => sum + answer.squaredErrors[at], 0) / total;
    const spread = answers.reduce(
      (sum, answer) => sum + answer.heldOutWeight * (answer.squaredErrors[at] / answer.heldOutWeight - error) ** 2,
      0,
    );
    errors.push(error);
    standardErrors.push(answers.length > 1 ? Math.sqrt(spread / total / (answers.length - 1)) : 0);
  }
  return { errors, standardErrors };
}

/** Position of the smallest error; the stronger penalty when they are equal (the path runs from strong to weak). */
export function smallestError(errors: readonly number[]): number {
  return errors.reduce((best, error, at) => (error < errors[best] ? at : best), 0);
}

/** The strongest penalty whose error is within one standard error of the smallest (Breiman et al. 1984, section 3.4.3). */
export function withinOneStandardError({ errors, standardErrors }: CrossValidation): number {
  const best = smallestError(errors);
  return errors.findIndex((error) => error <= errors[best] + standardErrors[best]);
}
