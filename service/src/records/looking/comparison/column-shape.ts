import type { CategoryRecordColumn, RecordColumn } from '../../../regression/records';
import { histogramOf } from '../../reading/histogram';

/** Both sides counted over the same stretches, or over the same levels. */
export interface ColumnShape {
  readonly edges: readonly number[];
  readonly levels: readonly string[];
  readonly from: readonly number[];
  readonly to: readonly number[];
}

const shownLevels = 20;

function rangeOf(...sides: readonly Float64Array[]): readonly [number, number] {
  let [minimum, maximum] = [Infinity, -Infinity];
  for (const values of sides) {
    for (const value of values) {
      if (value < minimum) minimum = value;
      if (value > maximum) maximum = value;
    }
  }
  return [minimum, maximum];
}

function shapeOfNumbers(from: Float64Array, to: Float64Array): ColumnShape | null {
  const [minimum, maximum] = rangeOf(from, to);
  if (minimum > maximum) return null;
  const [before, after] = [from, to].map((values) => histogramOf(values, minimum, maximum));
  return { edges: before.edges, levels: [], from: before.counts, to: after.counts };
}

function levelCounts({ codes, levels }: CategoryRecordColumn): Map<string, number> {
  const counts = new Float64Array(levels.length);
  for (const code of codes) if (code >= 0) counts[code]++;
  return new Map(levels.map((level, code) => [level, counts[code]]));
}

function shapeOfLevels(from: CategoryRecordColumn, to: CategoryRecordColumn): ColumnShape {
  const [before, after] = [levelCounts(from), levelCounts(to)];
  const both = (level: string): number => (before.get(level) ?? 0) + (after.get(level) ?? 0);
  const levels = [...new Set([...before.keys(), ...after.keys()])]
    .sort((a, b) => both(b) - both(a) || (a < b ? -1 : 1))
    .slice(0, shownLevels);
  const countsIn = (counts: ReadonlyMap<string, number>) => levels.map((level) => counts.get(level) ?? 0);
  return { edges: [], levels, from: countsIn(before), to: countsIn(after) };
}

/** Twenty equal bins over the range of both, or the twenty most frequent levels; null for text and mixed kinds. */
export function shapeOf(from: RecordColumn, to: RecordColumn): ColumnShape | null {
  if (from.kind === 'category' && to.kind === 'category') return shapeOfLevels(from, to);
  if (from.kind === 'numeric' && to.kind === 'numeric') return shapeOfNumbers(from.values, to.values);
  if (from.kind === 'date' && to.kind === 'date') return shapeOfNumbers(from.values, to.values);
  return null;
}
