import { sumOfSquares, weightedResiduals } from '../design/predict';
import { designForFold, spanOf, type FitContext } from '../fit-context';
import type { Moments } from '../design/moments';
import { RegressionError } from '../errors';
import { combineFolds, smallestError, withinOneStandardError } from '../selection/cross-validation';
import { runFoldPaths } from '../selection/fold-runs';
import type { PathAnswer } from '../selection/fold-task';

const FOLD_RULES: readonly string[] = ['minimum', 'one-standard-error'];

/**
 * Held-out root mean squared error (additive scale) of the whole procedure: for every fold the penalty is chosen anew by the
 * other folds among themselves, and the model without that fold at that penalty is measured on it (Stone 1974; Varma and Simon
 * 2006). Only for rules that look at folds, and for schemes in which every fold is trained on all others.
 */
export async function nestedError(
  context: FitContext,
  moments: readonly Moments[],
  lambdas: readonly number[],
  outer: readonly PathAnswer[],
): Promise<number> {
  const { folds } = context.plan;
  const { rule } = context.specification.penalty;
  if (!FOLD_RULES.includes(rule)) {
    throw new RegressionError(
      'bad-specification',
      `The rule ${rule} does not choose by folds, so nested folds have nothing to add. Choose minimum or one-standard-error.`,
    );
  }
  if (context.specification.validation.scheme === 'forward' || folds.length < 3) {
    throw new RegressionError('bad-specification', 'Nested folds need at least 3 folds that are not forward in time.');
  }
  let squares = 0;
  let weight = 0;
  for (const [at, fold] of folds.entries()) {
    const inner = folds
      .filter((other) => other !== fold)
      .map((other) => ({ ...other, training: other.training.filter((segment) => !fold.heldOut.includes(segment)) }));
    const answers = await runFoldPaths({ ...context, plan: { ...context.plan, folds: inner } }, moments, lambdas);
    const combined = combineFolds(answers, lambdas.length);
    const chosen = rule === 'one-standard-error' ? withinOneStandardError(combined) : smallestError(combined.errors);
    const design = designForFold(context, fold);
    for (const segment of fold.heldOut) {
      const { start, end } = spanOf(context.plan, segment);
      squares += sumOfSquares(weightedResiduals(design, outer[at].models[chosen], start, end));
    }
    weight += outer[at].heldOutWeight;
  }
  return Math.sqrt(squares / weight);
}
