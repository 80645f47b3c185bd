import type { NumericRecordColumn } from '../../regression/records';
import { boundsAround } from './conditions';
import { listRows, rowsText, stepForRows, type Finding } from './finding';
import { medianDeviation, quantileOf } from '../reading/sorted-figures';
import { sortedPresent } from './robust';

const outlyingDeviations = 8;
const fewestReadings = 20;
/** Above this share they are how the column is, not readings that lie apart. */
const largestShare = 0.05;

/** Where the readings that do not lie apart begin and end in the sorted column; the end is past the last. */
interface Inner {
  readonly start: number;
  readonly end: number;
  readonly onLogScale: boolean;
}

/** Of readings that are never negative and reach far to the right; readings of zero, which say "none", apart. */
function reachesRight(sorted: Float64Array): boolean {
  if (!(sorted[0] >= 0)) return false;
  const [low, middle, high] = [quantileOf(sorted, 0.05), quantileOf(sorted, 0.5), quantileOf(sorted, 0.95)];
  return high - middle > 2 * (middle - low);
}

/**
 * One look: readings further than eight deviations from the median (deviation: 1.4826 × median absolute deviation).
 * A column that reaches far to the right is judged by its logs, and only upwards: in such columns readings close to
 * zero are common, and far down on the log scale.
 */
function lookOnce(sorted: Float64Array, { start, end }: Inner): Inner {
  const inner = sorted.subarray(start, end);
  const onLogScale = reachesRight(inner);
  const zeros = onLogScale ? inner.findIndex((value) => value > 0) : 0;
  const judged = onLogScale ? inner.subarray(Math.max(0, zeros)).map(Math.log) : inner;
  const centre = quantileOf(judged, 0.5);
  const reach = outlyingDeviations * 1.4826 * medianDeviation(judged, centre);
  if (!(reach > 0)) return { start, end, onLogScale };
  let [first, last] = [0, judged.length - 1];
  while (!onLogScale && judged[first] < centre - reach) first++;
  while (judged[last] > centre + reach) last--;
  return { start: start + first, end: end - (judged.length - 1 - last), onLogScale };
}

/** Looks again without what was found, until nothing more is: far readings must not hide less far ones. */
function innerOf(sorted: Float64Array): Inner {
  let inner: Inner = { start: 0, end: sorted.length, onLogScale: false };
  for (;;) {
    const next = lookOnce(sorted, inner);
    const found = next.start - inner.start + (inner.end - next.end);
    inner = next;
    const outside = sorted.length - (inner.end - inner.start);
    if (found === 0 || outside > largestShare * sorted.length) return inner;
  }
}

function rowsOutside(values: Float64Array, low: number, high: number): number[] {
  const rows: number[] = [];
  for (let row = 0; row < values.length; row++) if (values[row] < low || values[row] > high) rows.push(row);
  return rows;
}

/**
 * Readings far from the median, measured by the median absolute deviation (Hampel 1974; the limit of eight is ours:
 * common practice, no source). `asGiven` holds the readings that a condition will see. Cost: one sort.
 */
export function findOutlying({ name, values }: NumericRecordColumn, asGiven: Float64Array = values): Finding[] {
  const sorted = sortedPresent(values);
  if (sorted.length < fewestReadings || sorted[0] === sorted[sorted.length - 1]) return [];
  const { start, end, onLogScale } = innerOf(sorted);
  const outside = sorted.length - (end - start);
  if (outside === 0 || outside > largestShare * sorted.length) return [];
  const rows = rowsOutside(values, sorted[start], sorted[end - 1]);
  const where = boundsAround(name, asGiven, rows);
  return [
    {
      kind: 'outlying-values',
      columns: [name],
      message: `${rowsText(rows.length)} of ${name} ${rows.length === 1 ? 'lies' : 'lie'} more than ${outlyingDeviations} deviations from the median${onLogScale ? ' on the log scale' : ''} (deviation: 1.4826 × median absolute deviation).`,
      remedy: 'Look at the rows; set to missing what cannot be true.',
      ...listRows(rows),
      where,
      steps: stepForRows(rows, where, (choice) => ({ kind: 'set-missing', column: name, ...choice })),
    },
  ];
}
