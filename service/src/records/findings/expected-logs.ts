import type { NumericRecordColumn, RecordTable } from '../../regression/records';
import { median, pairMoments, robustDeviation } from './robust';

const smallestRows = 20;
const guides = 5;
const guidingCorrelation = 0.6;
/** Lines, medians and deviations are taken from this many rows at most, spread evenly over the table. */
const fittedRows = 50_000;

/** A positive measure on the log scale. A zero says "none", not a quantity in a unit. */
const logOf = (value: number): number => (value > 0 ? Math.log(value) : NaN);

interface LogColumn {
  readonly column: NumericRecordColumn;
  /** Logs of the rows that lines are fitted to. */
  readonly logs: Float64Array;
  /** The same without those far from the middle: a mixed-up row would tilt a line fitted through all. */
  readonly middle: Float64Array;
}

/** Every n-th of the values, so that no more than `fittedRows` are left. */
export function thinned(values: Float64Array): Float64Array {
  const step = Math.ceil(values.length / fittedRows);
  if (step <= 1) return values;
  return Float64Array.from({ length: Math.floor((values.length - 1) / step) + 1 }, (_, at) => values[at * step]);
}

/** Whole numbers up to this are counts of things, which have no unit to mix up. */
const largestCount = 20;

function isPositiveMeasure({ values }: NumericRecordColumn): boolean {
  let present = 0;
  let counts = true;
  for (const value of values) {
    if (value < 0) return false;
    if (value !== value) continue;
    present++;
    counts &&= value <= largestCount && Number.isInteger(value);
  }
  return present >= smallestRows && !counts;
}

function logColumn(column: NumericRecordColumn): LogColumn {
  const logs = thinned(column.values).map(logOf);
  const centre = median(logs);
  const reach = 2.5 * Math.max(robustDeviation(logs, centre), 1e-9);
  return { column, logs, middle: logs.map((value) => (Math.abs(value - centre) <= reach ? value : NaN)) };
}

/** What one other column leads to expect: the least-squares line through the rows in the middle of both. */
interface Line {
  readonly values: Float64Array;
  readonly slope: number;
  readonly offset: number;
  readonly strength: number;
}

function lineFrom(target: LogColumn, guide: LogColumn): Line {
  const { meanX, meanY, sdX, sdY, correlation } = pairMoments(guide.middle, target.middle);
  const slope = (correlation * sdY) / sdX;
  return { values: guide.column.values, slope, offset: meanY - slope * meanX, strength: Math.abs(correlation) };
}

/** The median of the first `count` numbers, which are put in order: there are five at most. */
function medianOfFew(numbers: Float64Array, count: number): number {
  for (let at = 1; at < count; at++) {
    const value = numbers[at];
    let place = at;
    for (; place > 0 && numbers[place - 1] > value; place--) numbers[place] = numbers[place - 1];
    numbers[place] = value;
  }
  const middle = count >> 1;
  return count % 2 === 1 ? numbers[middle] : (numbers[middle - 1] + numbers[middle]) / 2;
}

function residualsOf(target: LogColumn, lines: readonly Line[]): Float64Array {
  const centre = median(target.logs);
  const guesses = new Float64Array(guides);
  return target.column.values.map((reading, row) => {
    const value = logOf(reading);
    if (value !== value) return NaN;
    let count = 0;
    for (const { values, slope, offset } of lines) {
      const guess = offset + slope * logOf(values[row]);
      if (guess === guess) guesses[count++] = guess;
    }
    return value - (count === 0 ? centre : medianOfFew(guesses, count));
  });
}

/**
 * For every positive measure, the log of each reading less what is expected of it: the median of what the most
 * related columns lead to expect, so that one of them being mixed up itself does not matter; or the column's own
 * median where none is related. Cost: rows × columns × 5, and 50,000 × columns².
 */
export function logResiduals(
  table: RecordTable,
): { readonly column: NumericRecordColumn; residuals(): Float64Array }[] {
  const columns = table.columns
    .filter((column) => column.kind === 'numeric')
    .filter(isPositiveMeasure)
    .map(logColumn);
  return columns.map((target) => ({
    column: target.column,
    residuals: () => {
      const lines = columns
        .filter((guide) => guide !== target)
        .map((guide) => lineFrom(target, guide))
        .filter((line) => line.strength >= guidingCorrelation)
        .sort((a, b) => b.strength - a.strength)
        .slice(0, guides);
      return residualsOf(target, lines);
    },
  }));
}
