import { shapeOf, toColumnModel, type ColumnModel } from '../design/moments';
import { sumOfSquares, weightedResiduals } from '../design/predict';
import { selectPositions } from '../design/select-positions';
import { designForFold, spanOf, type FitContext } from '../fit-context';
import type { FinishedFit } from '../fit-result';
import { seededRandom, shuffledOrder } from '../random';
import type { FitDiagnostics } from '../result';
import { momentsOf, trainingPart } from '../selection/fold-task';
import type { Fold } from '../selection/folds';
import { logSpaced } from '../selection/penalty-path';
import { solvePath } from '../solvers/solve-path';

const DEFAULT_SAMPLES = 50;
/** Multiplications up to which selection frequencies are worked out unasked. */
const CHEAP = 1e9;
const STEPS_TO_PENALTY = 10;

/** The model of a fit to some positions of a design at one λ, reached by warm starts from ten times as strong. */
function fitPositions(
  context: FitContext,
  positions: Int32Array,
  lambda: number,
  design = context.design,
): ColumnModel {
  const selected = selectPositions(design, positions);
  const whole = { start: 0, end: positions.length };
  const moments = context.route === 'moments' ? [momentsOf(selected, whole)] : [];
  const part = trainingPart(selected, context.route, [whole], moments);
  const lambdas =
    context.settings.kind === 'descent' && lambda > 0 ? logSpaced(lambda * 10, lambda, STEPS_TO_PENALTY) : [lambda];
  const solution = solvePath(part, design.columns, { ...context.settings, polish: false }, lambdas);
  return toColumnModel(part.problem, solution.weights[lambdas.length - 1], shapeOf(selected));
}

/**
 * Lasso and elastic net: the share of seeded half samples in which each column has a weight at the chosen λ (Meinshausen and
 * Bühlmann 2010, "Stability selection", section 2). Null for other methods, or when it is neither cheap nor asked for.
 */
export function selectionFrequency(fit: FinishedFit): FitDiagnostics['selectionFrequency'] {
  const { context, lambda } = fit;
  const { specification, design, read } = context;
  if (context.settings.mixing === 0 || lambda === 0) return null;
  const asked = specification.extras.selectionSamples;
  const samples = asked ?? DEFAULT_SAMPLES;
  if (asked === undefined && samples * read.count * design.columnCount ** 2 > CHEAP) return null;
  const random = seededRandom(specification.validation.seed);
  const counts = new Float64Array(design.columnCount);
  for (let sample = 0; sample < samples; sample += 1) {
    const half = shuffledOrder(read.count, random)
      .slice(0, Math.ceil(read.count / 2))
      .sort();
    fitPositions(context, half, lambda).weights.forEach((weight, column) => (counts[column] += weight === 0 ? 0 : 1));
  }
  return design.columns.map((column, at) => ({
    input: specification.inputs[column.input].column,
    ...(column.label === undefined ? {} : { level: column.label }),
    frequency: counts[at] / samples,
  }));
}

const CURVE_STEPS = 8;
const CURVE_FOLDS = 5;
const SMALLEST_TRAINING = 10;

/**
 * Held-out error (additive scale) against the number of training records: random parts of the training records of up to five
 * folds. With m of n records ridge keeps the prior (nλ as it is), lasso its usual rate (λ√n as it is).
 */
export function learningCurve(fit: FinishedFit): FitDiagnostics['learningCurve'] {
  const { context } = fit;
  if (context.specification.extras.learningCurve !== true) return null;
  const folds = context.plan.folds
    .slice(0, CURVE_FOLDS)
    .map((fold) => ({ fold, training: positionsOf(context, fold) }));
  const most = Math.min(...folds.map(({ training }) => training.length));
  const sizes = [...new Set(logSpaced(Math.min(SMALLEST_TRAINING, most), most, CURVE_STEPS).map(Math.round))];
  return sizes.map((records) => ({ records, rmse: curvePoint(fit, folds, records) }));
}

function positionsOf(context: FitContext, fold: Fold): Int32Array {
  return Int32Array.from(
    fold.training.flatMap((segment) => {
      const { start, end } = spanOf(context.plan, segment);
      return Array.from({ length: end - start }, (_, offset) => start + offset);
    }),
  );
}

function curvePoint(
  fit: FinishedFit,
  folds: readonly { readonly fold: Fold; readonly training: Int32Array }[],
  records: number,
): number {
  const { context, lambda } = fit;
  const random = seededRandom(context.specification.validation.seed + records);
  const ratio = context.read.count / records;
  const adjusted = lambda * (context.settings.mixing === 0 ? ratio : Math.sqrt(ratio));
  let squares = 0;
  let weight = 0;
  for (const { fold, training } of folds) {
    const design = designForFold(context, fold);
    const part = shuffledOrder(training.length, random)
      .slice(0, records)
      .map((at) => training[at])
      .sort();
    const model = fitPositions(context, part, adjusted, design);
    for (const segment of fold.heldOut) {
      const { start, end } = spanOf(context.plan, segment);
      squares += sumOfSquares(weightedResiduals(design, model, start, end));
      const roots = design.columnCount * design.rowCount;
      weight += sumOfSquares(design.data.subarray(roots + start, roots + end));
    }
  }
  return Math.sqrt(squares / weight);
}
