/**
 * A ridge problem reduced so that any λ is cheap. In coordinates scaled by √p:
 *   (A + λI) x = c,  residual(λ) = ‖y‖²/n after the free columns − c·x − λ x·x  (per record).
 */
export interface RidgeForm {
  /** Columns without a penalty. */
  readonly freeCount: number;
  /** Of A, ascending, not negative; in the dual only those that records can give. */
  readonly eigenvalues: Float64Array;
  /** Mean squared target that the held columns have to explain. */
  readonly targetSquare: number;
  /** Standardised weights of all kept columns, one array a λ. */
  weights(lambdas: readonly number[]): Float64Array[];
  /** Mean squared residual and squared length of x at λ. */
  parts(lambda: number): RidgeParts;
}

export interface RidgeParts {
  readonly residualSquare: number;
  readonly penaltySquare: number;
}

/** Directions weaker than this share of the strongest count as null. */
export const NULL_SHARE = 1e-10;

/** Trace of the hat matrix without the intercept: free columns + Σ d/(d + λ). */
export function degreesOfFreedom(form: RidgeForm, lambda: number): number {
  const floor = nullFloor(form);
  let total = form.freeCount;
  for (const eigenvalue of form.eigenvalues) if (eigenvalue > floor) total += eigenvalue / (eigenvalue + lambda);
  return total;
}

export function nullFloor(form: RidgeForm): number {
  const { eigenvalues } = form;
  return eigenvalues.length === 0 ? 0 : NULL_SHARE * eigenvalues[eigenvalues.length - 1];
}
