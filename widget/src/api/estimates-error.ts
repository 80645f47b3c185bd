import type { ProblemCode } from './contract';

/** Besides the desk's own codes: no answer came (a refused site looks the same to a page), or one that is not the contract's. */
export type FailureCode = ProblemCode | 'unreachable' | 'not-understood' | 'service-invalid';

export interface FieldProblem {
  /** The input's name, or null when the problem is with the case as a whole. */
  readonly input: string | null;
  readonly detail: string;
}

export interface FailureDetails {
  readonly detail?: string;
  readonly status?: number;
  readonly requestId?: string;
  readonly retryAfterSeconds?: number;
  readonly fields?: readonly FieldProblem[];
}

export class EstimatesError extends Error {
  override readonly name = 'EstimatesError';

  constructor(
    readonly code: FailureCode,
    message: string,
    readonly details: FailureDetails = {},
    cause?: unknown,
  ) {
    super(message, { cause });
  }
}
