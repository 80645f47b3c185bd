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
  const step = Math.max(1, readings.length / MOST_SORTED);
  const sample: number[] = [];
  for (let place = 0; Math.floor(place) < readings.length; place += step) {
    const value = readings[Math.floor(place)];
    if (!Number.isNaN(value)) sample.push(value);
  }
  // A column that is present only where the selection did not look.
  if (sample.length === 0) return readings.filter((value) => !Number.isNaN(value)).sort();
  return Float64Array.from(sample).sort();
}
