import { RegressionError } from '../errors';
import type { RecordColumn } from '../records';
import type { ResolvedValidation } from '../design/resolve-specification';
import { seededRandom, shuffledOrder } from '../random';
import { forwardPlan } from './forward-folds';

/**
 * How the records are split. Records are put into an order in which every fold is a few contiguous segments:
 * segment s holds the positions segmentStarts[s] … segmentStarts[s+1] − 1 of `order`.
 */
export interface FoldPlan {
  /** order[position] = record. */
  readonly order: Int32Array;
  readonly segmentStarts: readonly number[];
  readonly folds: readonly Fold[];
}

export interface Fold {
  readonly training: readonly number[];
  readonly heldOut: readonly number[];
}

/** Throws `too-few-folds` when the records or groups do not give two folds. Cost O(n log n). */
export function planFolds(
  count: number,
  rows: Int32Array,
  validation: ResolvedValidation,
  column: RecordColumn | null,
): FoldPlan {
  if (validation.scheme === 'k-fold') return complementPlan(randomFolds(count, validation));
  if (column === null)
    throw new RegressionError('bad-specification', `Validation by ${validation.scheme} folds needs its column.`);
  if (validation.scheme === 'forward') return forwardPlan(timesOf(column, rows), validation);
  return complementPlan(groupedFolds(groupsOf(column, rows), validation));
}

/** Fold number of each record; sizes differ by at most one. */
function randomFolds(count: number, validation: ResolvedValidation): Int32Array {
  const folds = Math.min(validation.folds, count);
  const foldOf = new Int32Array(count);
  shuffledOrder(count, seededRandom(validation.seed)).forEach((record, position) => {
    foldOf[record] = position % folds;
  });
  return foldOf;
}

/** Whole groups together: one fold a group when there are no more groups than folds, else largest first into the smallest fold. */
function groupedFolds(groupOf: Int32Array, validation: ResolvedValidation): Int32Array {
  const groupCount = groupOf.reduce((most, group) => Math.max(most, group), -1) + 1;
  if (groupCount < 2)
    throw new RegressionError(
      'too-few-folds',
      'Every record is in the same group; grouped validation needs at least 2.',
      validation.column,
    );
  if (groupCount <= validation.folds) return groupOf;
  const sizes = new Int32Array(groupCount);
  groupOf.forEach((group) => (sizes[group] += 1));
  const bySize = Array.from(shuffledOrder(groupCount, seededRandom(validation.seed))).sort(
    (first, second) => sizes[second] - sizes[first],
  );
  const foldSizes = new Float64Array(validation.folds);
  const foldOfGroup = new Int32Array(groupCount);
  for (const group of bySize) {
    const smallest = foldSizes.indexOf(foldSizes.reduce((least, size) => Math.min(least, size), Infinity));
    foldOfGroup[group] = smallest;
    foldSizes[smallest] += sizes[group];
  }
  return groupOf.map((group) => foldOfGroup[group]);
}

/** Each fold is one segment and is trained on all the others. */
function complementPlan(foldOf: Int32Array): FoldPlan {
  const foldCount = foldOf.reduce((most, fold) => Math.max(most, fold), 0) + 1;
  if (foldCount < 2)
    throw new RegressionError('too-few-folds', 'Validation needs at least 2 folds with records in them.');
  const segmentStarts = new Array<number>(foldCount + 1).fill(0);
  foldOf.forEach((fold) => (segmentStarts[fold + 1] += 1));
  for (let fold = 0; fold < foldCount; fold += 1) segmentStarts[fold + 1] += segmentStarts[fold];
  const next = segmentStarts.slice();
  const order = new Int32Array(foldOf.length);
  foldOf.forEach((fold, record) => {
    order[next[fold]] = record;
    next[fold] += 1;
  });
  const all = Array.from({ length: foldCount }, (_, fold) => fold);
  return {
    order,
    segmentStarts,
    folds: all.map((fold) => ({ training: all.filter((other) => other !== fold), heldOut: [fold] })),
  };
}

/** Group number of each record, numbered by first appearance of the group's sorted name. */
function groupsOf(column: RecordColumn, rows: Int32Array): Int32Array {
  const names = Array.from(rows, (row) => groupName(column, row));
  const numbered = column.kind === 'numeric' || column.kind === 'date';
  const distinct = [...new Set(names)].sort(numbered ? (first, second) => Number(first) - Number(second) : undefined);
  const position = new Map(distinct.map((name, index) => [name, index]));
  return Int32Array.from(names, (name) => position.get(name) ?? 0);
}

function groupName(column: RecordColumn, row: number): string {
  const name = column.kind === 'category' ? (column.levels[column.codes[row]] ?? null) : column.values[row];
  if (name === null || (typeof name === 'number' && Number.isNaN(name))) {
    throw new RegressionError(
      'missing-value',
      `${column.name} is missing in row ${row + 1}, so its record belongs to no fold.`,
      column.name,
    );
  }
  return String(name);
}

function timesOf(column: RecordColumn, rows: Int32Array): Float64Array {
  if (column.kind !== 'date' && column.kind !== 'numeric') {
    throw new RegressionError(
      'column-kind-unsuitable',
      `${column.name} is a ${column.kind} column and cannot order records in time.`,
      column.name,
    );
  }
  return Float64Array.from(rows, (row) => {
    const time = column.values[row];
    if (!Number.isFinite(time))
      throw new RegressionError(
        'missing-value',
        `${column.name} is missing in row ${row + 1}, so its record has no place in time.`,
        column.name,
      );
    return time;
  });
}
