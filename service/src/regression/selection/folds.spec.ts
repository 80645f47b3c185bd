import type { ResolvedValidation } from '../design/resolve-specification';
import type { RecordColumn } from '../records';
import { planFolds, type FoldPlan } from './folds';

const rows = (count: number): Int32Array => Int32Array.from({ length: count }, (_, row) => row);
const validation = (change: Partial<ResolvedValidation>): ResolvedValidation => ({
  scheme: 'k-fold',
  folds: 5,
  column: null,
  seed: 1,
  gap: 0,
  ...change,
});

/** Records of some segments. */
function recordsOf(plan: FoldPlan, segments: readonly number[]): number[] {
  return segments
    .flatMap((segment) => Array.from(plan.order.subarray(plan.segmentStarts[segment], plan.segmentStarts[segment + 1])))
    .sort((first, second) => first - second);
}

describe('k-fold', () => {
  it('holds every record out once, in folds whose sizes differ by one at most', () => {
    const plan = planFolds(23, rows(23), validation({}), null);
    const heldOut = plan.folds.map((fold) => recordsOf(plan, fold.heldOut));
    expect(heldOut.flat().sort((first, second) => first - second)).toEqual(Array.from(rows(23)));
    expect(heldOut.map((fold) => fold.length).sort()).toEqual([4, 4, 5, 5, 5]);
  });

  it('trains each fold on all records that it does not hold out', () => {
    const plan = planFolds(23, rows(23), validation({}), null);
    for (const fold of plan.folds)
      expect(recordsOf(plan, [...fold.training, ...fold.heldOut])).toEqual(Array.from(rows(23)));
  });

  it('is repeatable with a seed and different with another', () => {
    const orderOf = (seed: number): number[] => Array.from(planFolds(40, rows(40), validation({ seed }), null).order);
    expect(orderOf(7)).toEqual(orderOf(7));
    expect(orderOf(7)).not.toEqual(orderOf(8));
  });
});

describe('grouped folds', () => {
  const group: RecordColumn = {
    name: 'yard',
    kind: 'category',
    levels: ['a', 'b', 'c'],
    codes: Int32Array.from([0, 1, 2, 0, 1, 2, 0, 0]),
  };

  it('make every group a fold when there are no more groups than folds', () => {
    const plan = planFolds(8, rows(8), validation({ scheme: 'grouped' }), group);
    expect(plan.folds.map((fold) => recordsOf(plan, fold.heldOut))).toEqual([
      [0, 3, 6, 7],
      [1, 4],
      [2, 5],
    ]);
  });

  it('never split a group when there are more groups than folds', () => {
    const plan = planFolds(8, rows(8), validation({ scheme: 'grouped', folds: 2 }), group);
    const foldOf = (record: number): number =>
      plan.folds.findIndex((fold) => recordsOf(plan, fold.heldOut).includes(record));
    expect(plan.folds).toHaveLength(2);
    expect(new Set([0, 3, 6, 7].map(foldOf)).size).toBe(1);
    expect(foldOf(1)).toBe(foldOf(4));
  });

  it('refuse a single group', () => {
    const one: RecordColumn = { ...group, levels: ['a'], codes: new Int32Array(8) };
    expect(() => planFolds(8, rows(8), validation({ scheme: 'grouped', column: 'yard' }), one)).toThrow(
      expect.objectContaining({ code: 'too-few-folds' }),
    );
  });
});

describe('folds forward in time', () => {
  const day: RecordColumn = { name: 'day', kind: 'date', values: Float64Array.from([9, 8, 7, 6, 5, 4, 3, 2, 1, 0]) };

  it('hold out later records than they train on', () => {
    const plan = planFolds(10, rows(10), validation({ scheme: 'forward', folds: 4 }), day);
    expect(plan.folds).toHaveLength(4);
    for (const fold of plan.folds) {
      const latestTraining = Math.max(...recordsOf(plan, fold.training).map((record) => 9 - record));
      const firstHeldOut = Math.min(...recordsOf(plan, fold.heldOut).map((record) => 9 - record));
      expect(latestTraining).toBeLessThan(firstHeldOut);
    }
  });

  it('leave out the records within the gap', () => {
    const plan = planFolds(10, rows(10), validation({ scheme: 'forward', folds: 1, gap: 3 }), day);
    expect(recordsOf(plan, plan.folds[0].heldOut)).toEqual([0, 1, 2, 3, 4]);
    // Held out from day 5 on; the three days before it are left out.
    expect(recordsOf(plan, plan.folds[0].training)).toEqual([8, 9]);
  });

  it('never cut between records of the same moment', () => {
    const same: RecordColumn = { name: 'day', kind: 'date', values: Float64Array.from([1, 1, 1, 1, 1, 1, 2, 2, 2, 2]) };
    const plan = planFolds(10, rows(10), validation({ scheme: 'forward', folds: 4 }), same);
    expect(plan.folds.map((fold) => recordsOf(plan, fold.heldOut))).toEqual([[6, 7, 8, 9]]);
  });
});
