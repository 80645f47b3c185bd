import type { FinishedFit } from '../fit-result';
import type { TrainingFit } from './training-fit';

export interface StandardErrors {
  readonly intercept: number | null;
  /** By design column, original units; NaN where there is none. */
  readonly columns: Float64Array;
}

/**
 * Least squares: σ √diag (XᵀWX)⁻¹. Ridge: posterior standard deviations σ √diag (X̃ᵀWX̃ + nλP)⁻¹ under the prior that the
 * penalty stands for. Lasso and elastic net have none (Tibshirani 1996, section 2.5, on why): null.
 */
export function standardErrors({ context, lever, part }: FinishedFit, training: TrainingFit): StandardErrors | null {
  if (context.settings.kind === 'descent' || lever === null || training.degreesLeft <= 0) return null;
  const { design } = context;
  const size = lever.positions.length;
  const columns = new Float64Array(design.columnCount).fill(NaN);
  const shift = new Float64Array(size);
  lever.positions.forEach((position, at) => {
    const column = part.problem.kept[position];
    const scale = design.scales[column] * part.problem.scales[position];
    columns[column] = Math.sqrt(training.variance * lever.matrix[at * size + at]) / scale;
    shift[at] = design.centres[column] / scale;
  });
  if (!design.intercept) return { intercept: null, columns };
  let quadratic = lever.base;
  for (let i = 0; i < size; i += 1)
    for (let j = 0; j < size; j += 1) quadratic += shift[i] * lever.matrix[i * size + j] * shift[j];
  return { intercept: Math.sqrt(training.variance * Math.max(0, quadratic)), columns };
}
