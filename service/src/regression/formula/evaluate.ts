import { RegressionError } from '../errors';
import { cvPlusInterval } from './cv-plus-interval';
import type { Formula, FormulaInput } from './formula';
import { leverageAt } from './leverage';
import { codeReading, readCase, type Reading } from './read-case';

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

/** A case this much above the records' largest leverage is flagged; the margin covers the rounding of the packed matrix. */
const LEVERAGE_MARGIN = 1 + 1e-5;

/**
 * Evaluates one case: additive value = typical + Σ contributions. Deterministic: the same formula and case give the same bits.
 * Throws RegressionError `input-missing`, `input-not-suitable` or `unknown-level`, naming the input.
 * Cost: the number of columns times the number of folds.
 */
export function evaluateFormula(formula: Formula, inputs: CaseInputs): Evaluation {
  const flags: EvaluationFlag[] = [];
  const readings = readCase(formula, inputs, flags);
  const columns = formula.inputs.map((input, at) => codeReading(input.coding, readings[at]));
  const contributions = formula.inputs.map((input, at) => contributionOf(input, columns[at]));
  const additive = contributions.reduce((sum, { contribution }) => sum + contribution, formula.typicalAdditive);
  const flat = columns.flatMap((part) => Array.from(part));
  const leverage = formula.leverage === null ? null : leverageAt(formula.leverage, flat);
  if (formula.leverage !== null && leverage !== null && leverage > formula.leverage.largest * LEVERAGE_MARGIN) {
    flags.push({
      code: 'jointly-unusual',
      message:
        'No record combines such readings: each may be in range, but together they are unlike anything recorded.',
    });
  }
  const { logged, smearing } = { logged: formula.target.transform === 'log', smearing: formula.target.smearing };
  const median = logged ? Math.exp(additive) : additive;
  refuseOverflow(formula, median * smearing);
  const gaussian = gaussianInterval(formula, additive, leverage);
  const ofFolds = formula.interval.folds.length > 0 ? foldInterval(formula, readings, flat) : null;
  return {
    value: logged ? median * smearing : median,
    median,
    interval: ofFolds ?? gaussian ?? { level: formula.interval.level, low: median, high: median },
    gaussianInterval: gaussian,
    typical: formula.typical,
    scale: logged ? 'log' : 'original',
    contributions,
    flags,
  };
}

function refuseOverflow(formula: Formula, value: number): void {
  if (Number.isFinite(value)) return;
  throw new RegressionError(
    'input-not-suitable',
    `The case lies so far outside the records that ${formula.target.name} has no finite estimate.`,
  );
}

function contributionOf(input: FormulaInput, columns: Float64Array): Contribution {
  const contribution = columns.reduce((sum, value, at) => sum + value * input.weights[at], 0);
  const { mass, hangs } = input;
  const along = mass === 0 ? 0 : contribution / mass;
  const arm = along === 0 ? 0 : hangs === 'float' ? -along : along;
  return { input: input.name, arm, mass, contribution, hangs };
}

function foldInterval(formula: Formula, readings: readonly Reading[], flat: readonly number[]): EvaluationInterval {
  const bases = formula.interval.folds.map((fold) => {
    const columns =
      fold.codings === null
        ? flat
        : formula.inputs.flatMap((input, at) =>
            Array.from(codeReading(fold.codings?.[at] ?? input.coding, readings[at])),
          );
    return columns.reduce((sum, value, at) => sum + value * fold.weights[at], fold.typicalAdditive);
  });
  const { low, high } = cvPlusInterval(formula.interval.folds, bases, formula.interval.level);
  return onTargetScale(formula, low, high);
}

/** additive ± quantile · σ · √(1 + h) */
function gaussianInterval(formula: Formula, additive: number, leverage: number | null): EvaluationInterval | null {
  const { gaussian } = formula.interval;
  if (gaussian === null || leverage === null) return null;
  const half = gaussian.quantile * gaussian.residualSd * Math.sqrt(1 + leverage);
  return onTargetScale(formula, additive - half, additive + half);
}

function onTargetScale(formula: Formula, low: number, high: number): EvaluationInterval {
  const logged = formula.target.transform === 'log';
  return { level: formula.interval.level, low: logged ? Math.exp(low) : low, high: logged ? Math.exp(high) : high };
}
