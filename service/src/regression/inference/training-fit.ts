import { sumOfSquares, weightedResiduals } from '../design/predict';
import type { FinishedFit } from '../fit-result';

/** The final fit on its own records, additive scale. */
export interface TrainingFit {
  /** √w · residual by position. */
  readonly residuals: Float64Array;
  /** Σ w r² / n. */
  readonly residualSquare: number;
  /** n − 1 − df, or n − df without an intercept. */
  readonly degreesLeft: number;
  /** Σ w r² / degreesLeft; the mean square where no degrees are left. */
  readonly variance: number;
  readonly r2: number;
}

const known = new WeakMap<FinishedFit, TrainingFit>();

export function trainingFit(fit: FinishedFit): TrainingFit {
  const cached = known.get(fit);
  if (cached !== undefined) return cached;
  const { context, model, solution, choice, part } = fit;
  const { design, read } = context;
  const residuals = weightedResiduals(design, model, 0, design.rowCount);
  const square = sumOfSquares(residuals);
  const degreesLeft = read.count - solution.degreesOfFreedom[choice.at] - (design.intercept ? 1 : 0);
  const total = part.problem.targetSquare * part.problem.weightSum;
  const made = {
    residuals,
    residualSquare: square / read.count,
    degreesLeft,
    variance: square / (degreesLeft > 0 ? degreesLeft : read.count),
    r2: total > 0 ? 1 - square / total : 0,
  };
  known.set(fit, made);
  return made;
}
