import type { FitContext } from '../fit-context';
import { residualQuantile } from '../formula/cv-plus-interval';
import type { QuarterCoverage } from '../result';
import { residualsOfFold, type HeldOut } from './held-out';

export interface HeldOutAccuracy {
  readonly rmse: number;
  readonly mae: number;
  readonly r2: number;
}

/** exp(345) squared is still finite: a wild held-out estimate must not turn an error into infinity. */
const MOST_LOGARITHM = 345;

/** Held-out estimates in target units: the mean as it is shown, smeared by the fold's own factor when the target is logged. */
export function shownEstimates(context: FitContext, heldOut: HeldOut): Float64Array {
  if (context.specification.target.transform !== 'log') return heldOut.estimates;
  return heldOut.estimates.map((value, record) =>
    heldOut.foldOf[record] < 0
      ? NaN
      : Math.exp(Math.min(value, MOST_LOGARITHM)) * heldOut.outcomes[heldOut.foldOf[record]].smearing,
  );
}

/** Weighted over the records that some fold held out. r2 = 1 − Σw(y − ŷ)²/Σw(y − ȳ)². */
export function heldOutAccuracy(context: FitContext, shown: Float64Array, heldOut: HeldOut): HeldOutAccuracy {
  const { targetRecorded, weights } = context.read;
  let weightSum = 0,
    squares = 0,
    absolutes = 0,
    sum = 0;
  const origin = targetRecorded[0];
  for (let record = 0; record < shown.length; record += 1) {
    if (heldOut.foldOf[record] < 0) continue;
    const error = targetRecorded[record] - shown[record];
    weightSum += weights[record];
    squares += weights[record] * error * error;
    absolutes += weights[record] * Math.abs(error);
    sum += weights[record] * (targetRecorded[record] - origin);
  }
  const mean = origin + sum / weightSum;
  let total = 0;
  for (let record = 0; record < shown.length; record += 1)
    if (heldOut.foldOf[record] >= 0) total += weights[record] * (targetRecorded[record] - mean) ** 2;
  return { rmse: Math.sqrt(squares / weightSum), mae: absolutes / weightSum, r2: total > 0 ? 1 - squares / total : 0 };
}

export interface Coverage {
  readonly all: number;
  readonly gaussian: number | null;
  readonly byQuarter: readonly QuarterCoverage[];
}

/**
 * Held-out coverage: a record counts as covered when its held-out residual is within the ⌈level(m+1)⌉-th smallest of the m
 * absolute held-out residuals of the other folds, so that neither its model nor its width has seen it. The Gaussian half-width
 * is the one given.
 */
export function heldOutCoverage(
  context: FitContext,
  heldOut: HeldOut,
  shown: Float64Array,
  gaussianHalf: number | null,
): Coverage {
  const { intervalLevel } = context.specification;
  const lists = foldResiduals(heldOut);
  const widths = lists.map((own) =>
    residualQuantile(
      lists.filter((list) => list !== own),
      intervalLevel,
    ),
  );
  const records = Array.from(heldOut.foldOf.keys()).filter((record) => heldOut.foldOf[record] >= 0);
  const covered = (record: number): boolean => Math.abs(heldOut.residuals[record]) <= widths[heldOut.foldOf[record]];
  const gaussianCovered = (record: number): boolean =>
    gaussianHalf !== null && Math.abs(heldOut.residuals[record]) <= gaussianHalf;
  const share = (chosen: readonly number[], test: (record: number) => boolean): number =>
    chosen.filter(test).length / chosen.length;
  const sorted = records.slice().sort((first, second) => shown[first] - shown[second] || first - second);
  const byQuarter = [0, 1, 2, 3].flatMap((quarter) => {
    const part = sorted.slice(
      Math.floor((quarter * sorted.length) / 4),
      Math.floor(((quarter + 1) * sorted.length) / 4),
    );
    if (part.length === 0) return [];
    const gaussian = gaussianHalf === null ? null : share(part, gaussianCovered);
    return [
      {
        from: shown[part[0]],
        to: shown[part[part.length - 1]],
        records: part.length,
        coverage: share(part, covered),
        coverageGaussian: gaussian,
      },
    ];
  });
  return {
    all: share(records, covered),
    gaussian: gaussianHalf === null ? null : share(records, gaussianCovered),
    byQuarter,
  };
}

function foldResiduals(heldOut: HeldOut): { residuals: readonly number[]; counts: readonly number[] }[] {
  return heldOut.outcomes.map((_, fold) => {
    const residuals = Array.from(residualsOfFold(heldOut, fold));
    return { residuals, counts: residuals.map(() => 1) };
  });
}
