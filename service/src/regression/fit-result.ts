import type { ColumnModel } from './design/moments';
import type { FitContext } from './fit-context';
import type { FormulaInterval, FormulaLeverage } from './formula/formula';
import { leverageAt, packLower } from './formula/leverage';
import { reportOf } from './fit-report';
import { heldOutAccuracy, heldOutCoverage, shownEstimates } from './inference/accuracy';
import { diagnose } from './inference/diagnose';
import type { HeldOut } from './inference/held-out';
import { sampledPositions, type LeverageMatrix } from './inference/influence';
import { standardisedRow } from './inference/hat-features';
import { standardErrors } from './inference/standard-errors';
import { studentQuantile } from './inference/student-t';
import { trainingFit, type TrainingFit } from './inference/training-fit';
import type { FitAccuracy, FitPenalty, FitResult, FitWeight, PathPoint } from './result';
import type { Choice } from './selection/choice';
import type { PenaltyPlan } from './selection/choose-penalty';
import type { CrossValidation } from './selection/cross-validation';
import type { OriginalUnits } from './solvers/original-units';
import type { PathSolution, TrainingPart } from './solvers/solve-path';
import { LongSum } from './linear-algebra/double-double';

/** Everything that a fit has found, before it is put into words and units. */
export interface FinishedFit {
  readonly context: FitContext;
  readonly part: TrainingPart;
  readonly plan: PenaltyPlan;
  readonly crossValidation: CrossValidation;
  readonly choice: Choice;
  readonly solution: PathSolution;
  readonly lambda: number;
  /** Standardised, of the kept columns. */
  readonly weights: Float64Array;
  readonly model: ColumnModel;
  /** Least squares solved in original units; null elsewhere. */
  readonly original: OriginalUnits | null;
  readonly heldOut: HeldOut;
  readonly smearing: number;
  readonly lever: LeverageMatrix | null;
  readonly foldsConverged: boolean;
  /** When asked for. */
  readonly nestedRmse: number | null;
}

export function assembleResult(fit: FinishedFit): FitResult {
  const training = trainingFit(fit);
  const errors = standardErrors(fit, training);
  return {
    penalty: penaltyOf(fit, training),
    intercept: interceptOf(fit),
    interceptStandardError: errors?.intercept ?? null,
    weights: weightsOf(fit, errors?.columns ?? null),
    accuracy: accuracyOf(fit, training),
    path: pathOf(fit),
    report: reportOf(fit),
    diagnostics: diagnose(fit, training),
  };
}

function penaltyOf({ context, lambda, part, solution, choice, plan }: FinishedFit, training: TrainingFit): FitPenalty {
  const lambdaSum = lambda * part.problem.weightSum;
  const { evidence } = plan;
  const settledByEvidence = evidence !== null && evidence.lambda === lambda;
  const variance = settledByEvidence ? evidence.residualVariance : training.variance;
  return {
    lambda,
    lambdaSum,
    priorSd: lambdaSum > 0 && context.settings.mixing === 0 ? Math.sqrt(variance / lambdaSum) : null,
    effectiveDegreesOfFreedom: solution.degreesOfFreedom[choice.at],
    choices: choice.choices,
  };
}

/** b₀ = ȳ − Σ b_j x̄_j, summed in twice the precision. */
function interceptOf({ context, model, original }: FinishedFit): number {
  if (original !== null) return original.intercept;
  const { design } = context;
  const sum = new LongSum();
  sum.add(design.targetCentre);
  sum.add(model.constant);
  for (let column = 0; column < design.columnCount; column += 1) {
    if (design.scales[column] !== 0)
      sum.addProduct(-(model.weights[column] / design.scales[column]), design.centres[column]);
  }
  return sum.value();
}

function weightsOf(
  { context, model, original, solution, part }: FinishedFit,
  errors: Float64Array | null,
): FitWeight[] {
  const { design, specification } = context;
  const dependent = new Set(solution.dependent.map((at) => part.problem.kept[at]));
  return design.columns.map((column, at) => {
    const scale = design.scales[at];
    const error = errors?.[at] ?? NaN;
    const leftOut = column.leftOut ?? (dependent.has(at) ? ('dependent' as const) : undefined);
    return {
      input: specification.inputs[column.input].column,
      ...(column.label === undefined ? {} : { level: column.label }),
      value: original?.values[at] ?? (scale === 0 ? 0 : model.weights[at] / scale),
      standardised: model.weights[at],
      ...(Number.isFinite(error) ? { standardError: error } : {}),
      centre: design.centres[at],
      scale,
      penaltyFactor: column.penaltyFactor,
      sign: column.sign,
      ...(leftOut === undefined ? {} : { leftOut }),
    };
  });
}

function accuracyOf(fit: FinishedFit, training: TrainingFit): FitAccuracy {
  const { context, heldOut, crossValidation, choice } = fit;
  const shown = shownEstimates(context, heldOut);
  const gaussian = gaussianOf(fit);
  const meanLeverage =
    (fit.solution.degreesOfFreedom[choice.at] + (context.design.intercept ? 1 : 0)) / context.read.count;
  const half = gaussian === null ? null : gaussian.quantile * gaussian.residualSd * Math.sqrt(1 + meanLeverage);
  const coverage = heldOutCoverage(context, heldOut, shown, half);
  const error = crossValidation.errors[choice.at];
  const standardError = crossValidation.standardErrors[choice.at];
  return {
    ...heldOutAccuracy(context, shown, heldOut),
    standardErrorOfCv: standardError,
    rmseStandardError: error > 0 ? standardError / (2 * Math.sqrt(error)) : 0,
    coverage: coverage.all,
    coverageGaussian: coverage.gaussian,
    coverageByQuarter: coverage.byQuarter,
    trainingRmse: Math.sqrt(training.residualSquare),
    ...(fit.nestedRmse === null ? {} : { nestedRmse: fit.nestedRmse }),
  };
}

function pathOf({ context, plan, solution, crossValidation, part }: FinishedFit): PathPoint[] {
  return plan.lambdas.map((lambda, at) => {
    const standardised = new Array<number>(context.design.columnCount).fill(0);
    part.problem.kept.forEach((column, index) => (standardised[column] = solution.weights[at][index]));
    return {
      lambda,
      effectiveDegreesOfFreedom: solution.degreesOfFreedom[at],
      cvError: crossValidation.errors[at],
      cvStandardError: crossValidation.standardErrors[at],
      standardised,
    };
  });
}

/** Student's t where the residual variance is estimated with few degrees; none for lasso and elastic net. */
export function gaussianOf(fit: FinishedFit): FormulaInterval['gaussian'] {
  if (fit.context.settings.kind === 'descent' || fit.lever === null) return null;
  const training = trainingFit(fit);
  if (training.degreesLeft <= 0) return null;
  return {
    residualSd: Math.sqrt(training.variance),
    quantile: studentQuantile(fit.context.specification.intervalLevel, training.degreesLeft),
  };
}

/** The leverage matrix as the formula keeps it; `largest` is taken with the packed figures, over the records (evenly sampled above 20,000). */
export function leverageOf({ context, part }: FinishedFit, lever: LeverageMatrix): FormulaLeverage {
  const { design } = context;
  const packed = packLower(lever.matrix, lever.positions.length);
  const columns = lever.positions.map((at) => part.problem.kept[at]);
  const bare = { columns: columns.map((_, at) => at), constant: lever.base, packed, largest: 0 };
  let largest = 0;
  for (const position of sampledPositions(design.rowCount)) {
    const root = design.data[design.columnCount * design.rowCount + position];
    const row = standardisedRow(design, part.problem, position);
    largest = Math.max(
      largest,
      leverageAt(
        bare,
        lever.positions.map((at) => row[at] / root),
      ),
    );
  }
  return { columns, constant: lever.base, packed, largest };
}
