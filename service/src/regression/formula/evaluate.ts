import type { Formula } from './formula';
import { RegressionError } from '../errors';

/** One reading an input; a date is an ISO 8601 day ("2026-03-31") or days since 1970-01-01; null or absent is missing. */
export type CaseInputs = Readonly<Record<string, number | string | null>>;

export type EvaluationFlagCode = 'outside-range' | 'unknown-level' | 'missing-filled' | 'jointly-unusual';

export interface EvaluationFlag {
  readonly code: EvaluationFlagCode;
  readonly input?: string;
  readonly message: string;
}

/**
 * One input's place on the beam. contribution = arm · mass for a load and −arm · mass for a float;
 * contributions sum to value − typical on the additive scale.
 */
export interface Contribution {
  readonly input: string;
  readonly arm: number;
  readonly mass: number;
  readonly contribution: number;
  readonly hangs: 'load' | 'float';
}

export interface EvaluationInterval {
  readonly level: number;
  readonly low: number;
  readonly high: number;
}

export interface Evaluation {
  /** Estimate in target units: the mean (for a logged target, smeared). */
  readonly value: number;
  /** Equal to value unless the target was logged. */
  readonly median: number;
  readonly interval: EvaluationInterval;
  /** The Gaussian or posterior interval, where theory gives one. */
  readonly gaussianInterval: EvaluationInterval | null;
  readonly typical: number;
  readonly scale: 'original' | 'log';
  readonly contributions: readonly Contribution[];
  readonly flags: readonly EvaluationFlag[];
}

/** Evaluates one case. Throws RegressionError `input-missing`, `input-not-suitable` or `unknown-level`, naming the input. */
export function evaluateFormula(formula: Formula, inputs: CaseInputs): Evaluation {
  throw new RegressionError('input-missing', `No evaluation of ${formula.target.name} for ${Object.keys(inputs).length} inputs yet.`);
}
