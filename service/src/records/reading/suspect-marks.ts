/** A number that comes back and lies far from the rest: perhaps a mark for "no reading". */
export interface SuspectMark {
  readonly mark: string;
  readonly count: number;
}

const leastTimes = 3;
/** How many scaled median absolute deviations count as far; 1.4826 makes one of them a standard deviation. */
const farAway = 5;
const toStandardDeviation = 1.4826;

/** All nines, −1, or nines below zero: how exports write "no reading" as a number. Common practice, no source. */
const hasMarkForm = (value: number): boolean => value === -1 || /^-?9+$/.test(String(value));

function medianOf(sorted: readonly number[]): number {
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

const ascending = (values: readonly number[]): number[] => [...values].sort((a, b) => a - b);

/**
 * Of a column's readings. The rest, from which a mark must lie far, are those that do not have the form of one; when
 * more than half of them are equal their deviation is nothing, and whatever lies outside them is far. Cost: n log n.
 */
export function suspectMarksOf(values: readonly number[]): SuspectMark[] {
  const counts = new Map<number, number>();
  for (const value of values) if (hasMarkForm(value)) counts.set(value, (counts.get(value) ?? 0) + 1);
  const repeated = [...counts].filter(([, count]) => count >= leastTimes);
  if (repeated.length === 0) return [];
  const rest = ascending(values.filter((value) => !Number.isNaN(value) && !hasMarkForm(value)));
  if (rest.length === 0) return [];
  const median = medianOf(rest);
  const deviation = toStandardDeviation * medianOf(ascending(rest.map((value) => Math.abs(value - median))));
  const isFar = (value: number): boolean =>
    deviation > 0 ? Math.abs(value - median) > farAway * deviation : value < rest[0] || value > rest[rest.length - 1];
  return repeated
    .filter(([value]) => isFar(value))
    .map(([value, count]) => ({ mark: String(value), count }))
    .sort((a, b) => b.count - a.count);
}
