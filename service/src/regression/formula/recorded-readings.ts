import type { RecordedRange } from './formula';

/** Smallest and largest reading that is present. */
export function rangeOf(readings: Float64Array): RecordedRange {
  let min = Infinity;
  let max = -Infinity;
  for (let record = 0; record < readings.length; record += 1) {
    const value = readings[record];
    if (value < min) min = value;
    if (value > max) max = value;
  }
  return { min, max };
}

/** Sorting every reading of a large table would cost more than the fit; deciles need no more than this many. */
const MOST_SORTED = 20000;

/** The present readings in ascending order: all of them, or an even selection of 20,000. */
export function sortedSample(readings: Float64Array): Float64Array {
  const most = Math.min(readings.length, MOST_SORTED);
  const sample = new Float64Array(most);
  let count = 0;
  for (let at = 0; at < most; at += 1) {
    const value = readings[Math.floor((at * readings.length) / most)];
    if (Number.isNaN(value)) continue;
    sample[count] = value;
    count += 1;
  }
  // A column that is present only where the selection did not look.
  if (count === 0) return readings.filter((value) => !Number.isNaN(value)).sort();
  return sample.subarray(0, count).sort();
}
