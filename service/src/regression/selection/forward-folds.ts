import type { ResolvedValidation } from '../design/resolve-specification';
import { RegressionError } from '../errors';
import type { Fold, FoldPlan } from './folds';

/**
 * Forward in time: the records in time order are cut into folds + 1 blocks of nearly equal size, never inside one moment;
 * block k is held out from a fit on the blocks before it, less the records of the `gap` before its first moment (from
 * start − gap on).
 */
export function forwardPlan(times: Float64Array, validation: ResolvedValidation): FoldPlan {
  const order = Int32Array.from(times, (_, record) => record).sort(
    (first, second) => times[first] - times[second] || first - second,
  );
  const sorted = Float64Array.from(order, (record) => times[record]);
  const starts = blockStarts(sorted, validation.folds + 1);
  const pieces = starts.slice(1).map((start, index) => ({
    start,
    end: starts[index + 2] ?? sorted.length,
    trainingEnd: validation.gap > 0 ? firstAtOrAfter(sorted, sorted[start] - validation.gap) : start,
  }));
  const usable = pieces.filter((piece) => piece.trainingEnd >= 2);
  if (usable.length < 1) {
    throw new RegressionError(
      'too-few-folds',
      'The time column and the gap leave no fold with records before it.',
      validation.column,
    );
  }
  const cuts = [
    ...new Set([0, sorted.length, ...usable.flatMap((piece) => [piece.start, piece.end, piece.trainingEnd])]),
  ].sort((first, second) => first - second);
  return { order, segmentStarts: cuts, folds: usable.map((piece) => foldOf(cuts, piece)) };
}

function foldOf(cuts: readonly number[], piece: { start: number; end: number; trainingEnd: number }): Fold {
  const segments = cuts.slice(0, -1).map((_, segment) => segment);
  return {
    training: segments.filter((segment) => cuts[segment + 1] <= piece.trainingEnd),
    heldOut: segments.filter((segment) => cuts[segment] >= piece.start && cuts[segment + 1] <= piece.end),
  };
}

function blockStarts(sorted: Float64Array, blocks: number): number[] {
  const starts = [0];
  for (let block = 1; block < blocks; block += 1) {
    const wanted = Math.round((block * sorted.length) / blocks);
    const start = wanted >= sorted.length ? sorted.length : firstAtOrAfter(sorted, sorted[wanted]);
    if (start > starts[starts.length - 1] && start < sorted.length) starts.push(start);
  }
  return starts;
}

function firstAtOrAfter(sorted: Float64Array, time: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle] < time) low = middle + 1;
    else high = middle;
  }
  return low;
}
