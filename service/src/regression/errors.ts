/** Every refusal of the regression engine carries one of these codes; they are part of the public contract. */
export const REGRESSION_ERROR_CODES = [
  'bad-specification',
  'column-not-found',
  'column-kind-unsuitable',
  'target-not-positive',
  'transform-not-possible',
  'missing-value',
  'value-not-finite',
  'weights-not-usable',
  'too-few-records',
  'too-few-folds',
  'no-usable-input',
  'not-identifiable',
  'not-converged',
  'unknown-level',
  'input-missing',
  'input-not-suitable',
] as const;

export type RegressionErrorCode = (typeof REGRESSION_ERROR_CODES)[number];

/** A refusal with a stable code, a sentence for people, and the column that caused it where there is one. */
export class RegressionError extends Error {
  override readonly name = 'RegressionError';

  constructor(
    readonly code: RegressionErrorCode,
    message: string,
    readonly column: string | null = null,
  ) {
    super(message);
  }
}
