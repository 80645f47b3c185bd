import type { DesignMatrix } from '../design/design-matrix';
import type { StandardisedProblem } from '../design/moments';
import { featureShrink, featuresOf, standardisedRow, type HatFeatures } from './hat-features';

/**
 * Exact leave-one-out error of a ridge for every λ: mean over records of w (r/(1 − h))², h with the intercept
 * (Golub, Heath and Wahba 1979). Exact for records left out of a fit with the same standardised columns and the same nλ.
 * Cost n p² + n p a λ.
 */
export function leaveOneOutErrors(
  design: DesignMatrix,
  problem: StandardisedProblem,
  features: HatFeatures,
  lambdas: readonly number[],
): number[] {
  const shrinks = lambdas.map((lambda) => featureShrink(features, lambda));
  const totals = new Float64Array(lambdas.length);
  for (let position = 0; position < design.rowCount; position += 1) {
    const parts = rowParts(design, problem, features, position);
    shrinks.forEach((shrink, at) => {
      const { residual, leverage } = atShrink(parts, features, shrink, problem.weightSum);
      const left = Math.max(1 - leverage, Number.EPSILON);
      totals[at] += (residual / left) ** 2;
    });
  }
  return Array.from(totals, (total) => total / problem.weightSum);
}

export interface RowParts {
  readonly features: Float64Array;
  /** √w (y − mean). */
  readonly target: number;
  /** Leverage of the intercept alone, w/n (0 without one). */
  readonly base: number;
}

export function rowParts(
  design: DesignMatrix,
  problem: StandardisedProblem,
  features: HatFeatures,
  position: number,
): RowParts {
  const { rowCount, columnCount, data } = design;
  const root = data[columnCount * rowCount + position];
  return {
    features: featuresOf(features, standardisedRow(design, problem, position)),
    target: data[(columnCount + 1) * rowCount + position] - problem.targetMean * root,
    base: design.intercept ? (root * root) / problem.weightSum : 0,
  };
}

/** √w-residual and leverage of one record. */
export function atShrink(
  parts: RowParts,
  features: HatFeatures,
  shrink: Float64Array,
  weightSum: number,
): { residual: number; leverage: number } {
  let fitted = 0;
  let quadratic = 0;
  for (let k = 0; k < features.size; k += 1) {
    const scaled = parts.features[k] * shrink[k];
    fitted += scaled * features.cross[k];
    quadratic += scaled * parts.features[k];
  }
  return { residual: parts.target - fitted, leverage: parts.base + quadratic / weightSum };
}
