import type { components } from '../../../openapi/types/desk';

/** What a worker thread is given. */
export interface FitTask {
  readonly databasePath: string;
  readonly revisionId: string;
  readonly specification: components['schemas']['Specification'];
}

export interface FitFailure {
  readonly code: string;
  readonly message: string;
  readonly column: string | null;
}

/** What a done fit leaves in its row. */
export interface FinishedColumns {
  /** JSON. */
  readonly result: string;
  /** Canonical JSON. */
  readonly formula: string;
  readonly lambda: number;
  readonly effectiveDegreesOfFreedom: number;
  readonly rmse: number;
  readonly r2: number | null;
}

/** What it says. The last message is `done` or `failed`. */
export type FitMessage =
  | { readonly kind: 'progress'; readonly progress: components['schemas']['Progress'] }
  | { readonly kind: 'done'; readonly finished: FinishedColumns }
  | { readonly kind: 'failed'; readonly failure: FitFailure };

export type FitOutcome = Exclude<FitMessage, { readonly kind: 'progress' }>;
