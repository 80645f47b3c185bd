import type { ColumnModel } from '../design/moments';
import { weightedResiduals } from '../design/predict';
import { designForFold, spanOf, type FitContext } from '../fit-context';
import type { InputCoding } from '../formula/formula';

/** One fold's model on the design that it was coded with. */
export interface FoldOutcome {
  readonly model: ColumnModel;
  readonly targetCentre: number;
  /** Null when it shares the formula's codings. */
  readonly codings: readonly InputCoding[] | null;
  /** Duan's factor from the fold's own training records; 1 when the target is not logged. */
  readonly smearing: number;
}

/** Held-out estimates by record (not by position); NaN and −1 where no fold held the record out. */
export interface HeldOut {
  readonly outcomes: readonly FoldOutcome[];
  readonly foldOf: Int32Array;
  /** Additive scale: target − estimate. */
  readonly residuals: Float64Array;
  /** Additive scale. */
  readonly estimates: Float64Array;
}

/** Cost n · columns for the residuals, and K times that for the smearing of a logged target. */
export function holdOut(context: FitContext, models: readonly ColumnModel[]): HeldOut {
  const { read, plan } = context;
  const residuals = new Float64Array(read.count).fill(NaN);
  const estimates = new Float64Array(read.count).fill(NaN);
  const foldOf = new Int32Array(read.count).fill(-1);
  const outcomes = plan.folds.map((fold, at) => {
    const design = designForFold(context, fold);
    const model = models[at];
    for (const segment of fold.heldOut) {
      const { start, end } = spanOf(plan, segment);
      weightedResiduals(design, model, start, end).forEach((value, offset) => {
        const record = plan.order[start + offset];
        residuals[record] = value / Math.sqrt(read.weights[record]);
        estimates[record] = read.target[record] - residuals[record];
        foldOf[record] = at;
      });
    }
    const smearing =
      context.specification.target.transform === 'log' ? smearingOf(context, design, model, fold.training) : 1;
    return {
      model,
      targetCentre: design.targetCentre,
      codings: context.designPerFold ? design.codings : null,
      smearing,
    };
  });
  return { outcomes, foldOf, residuals, estimates };
}

type Design = ReturnType<typeof designForFold>;

/** A residual of the logarithm beyond this would overflow the mean. */
const MOST_RESIDUAL = 300;

/** Σ w exp(residual) / Σ w (Duan 1983). */
export function smearingOf(
  context: FitContext,
  design: Design,
  model: ColumnModel,
  segments: readonly number[],
): number {
  const { read, plan } = context;
  let sum = 0;
  let weightSum = 0;
  for (const segment of segments) {
    const { start, end } = spanOf(plan, segment);
    weightedResiduals(design, model, start, end).forEach((value, offset) => {
      const weight = read.weights[plan.order[start + offset]];
      sum += weight * Math.exp(Math.min(value / Math.sqrt(weight), MOST_RESIDUAL));
      weightSum += weight;
    });
  }
  return sum / weightSum;
}

/** Absolute held-out residuals of one fold, ascending. */
export function residualsOfFold({ residuals, foldOf }: HeldOut, fold: number): Float64Array {
  const found: number[] = [];
  for (let record = 0; record < residuals.length; record += 1)
    if (foldOf[record] === fold) found.push(Math.abs(residuals[record]));
  return Float64Array.from(found).sort();
}
