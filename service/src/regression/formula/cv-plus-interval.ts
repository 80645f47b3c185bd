import type { FoldModel } from './formula';

type FoldResiduals = Pick<FoldModel, 'residuals' | 'counts'>;

/** Slack for the rounding of level·(n + 1): 0.9 · 10 must give 9, not 10. */
const INDEX_SLACK = 1e-9;

/**
 * CV+ (Barber, Candès, Ramdas and Tibshirani 2021, eq. 1.6 and section 3): with n held-out residuals R_i and the fold models'
 * predictions μ_{−k(i)}(x), from the (n+1−m)-th smallest of μ − R to the m-th smallest of μ + R, m = ⌈level·(n+1)⌉. With too few
 * records for the level (m > n, in theory an infinite interval) the widest is given.
 */
export function cvPlusInterval(
  folds: readonly FoldResiduals[],
  predictions: readonly number[],
  level: number,
): { low: number; high: number } {
  const total = folds.reduce((sum, fold) => sum + fold.counts.reduce((count, value) => count + value, 0), 0);
  const above = total - quantileIndex(total, level) + 1;
  return {
    low: -fromTop(
      folds,
      predictions.map((value) => -value),
      above,
    ),
    high: fromTop(folds, predictions, above),
  };
}

/** ⌈level·(n+1)⌉, at most n. */
export function quantileIndex(total: number, level: number): number {
  return Math.min(total, Math.max(1, Math.ceil(level * (total + 1) - INDEX_SLACK)));
}

/** The ⌈level·(m+1)⌉-th smallest of all the folds' m residuals; infinite without any. */
export function residualQuantile(folds: readonly FoldResiduals[], level: number): number {
  const total = folds.reduce((sum, fold) => sum + fold.counts.reduce((count, value) => count + value, 0), 0);
  if (total === 0) return Infinity;
  return fromTop(
    folds,
    folds.map(() => 0),
    total - quantileIndex(total, level) + 1,
  );
}

/** The `rank`-th largest of all base + residual: the folds' ascending lists are merged from their ends. */
function fromTop(folds: readonly FoldResiduals[], bases: readonly number[], rank: number): number {
  const ends = folds.map((fold) => fold.residuals.length - 1);
  let passed = 0;
  for (;;) {
    let best = -1;
    let bestValue = -Infinity;
    for (let fold = 0; fold < folds.length; fold += 1) {
      if (ends[fold] < 0) continue;
      const value = bases[fold] + folds[fold].residuals[ends[fold]];
      if (best < 0 || value > bestValue) {
        best = fold;
        bestValue = value;
      }
    }
    if (best < 0) return bestValue;
    passed += folds[best].counts[ends[best]];
    if (passed >= rank) return bestValue;
    ends[best] -= 1;
  }
}

const DIGITS = 12;

/**
 * Ascending residuals thinned to at most `limit` steps: finest in the upper third, where intervals are read off. Each step
 * takes its largest member, rounded upward.
 */
export function thinResiduals(ascending: Float64Array, limit: number): FoldResiduals {
  const cuts =
    ascending.length <= limit ? Array.from(ascending.keys(), (at) => at + 1) : stepEnds(ascending.length, limit);
  const residuals: number[] = [];
  const counts: number[] = [];
  let start = 0;
  for (const end of cuts) {
    residuals.push(roundUp(ascending[end - 1]));
    counts.push(end - start);
    start = end;
  }
  return { residuals, counts };
}

function stepEnds(length: number, limit: number): number[] {
  const coarse = Math.max(1, Math.floor(limit / 5));
  const fine = limit - coarse;
  const border = Math.floor((length * 2) / 3);
  const ends = new Set<number>();
  for (let step = 1; step <= coarse; step += 1) ends.add(Math.max(1, Math.round((border * step) / coarse)));
  for (let step = 1; step <= fine; step += 1)
    ends.add(border + Math.max(1, Math.round(((length - border) * step) / fine)));
  return [...ends].sort((first, second) => first - second);
}

function roundUp(value: number): number {
  const rounded = Number(value.toPrecision(DIGITS));
  return rounded >= value
    ? rounded
    : rounded + Number((10 ** (Math.floor(Math.log10(value)) - DIGITS + 1)).toPrecision(3));
}
