import type { DateRecordColumn } from '../../regression/records';
import { dateText } from '../reading/date-cell';
import { quantileOf } from '../reading/sorted-figures';
import { oneOfTexts } from './conditions';
import { listRows, type Finding } from './finding';

const fewestDays = 20;
/** The longest gaps of a column that are told. */
const toldGaps = 5;

function sortedDays(values: Float64Array): Float64Array {
  const days = values.map(Math.floor).sort();
  return days.filter((day, at) => day === day && day !== days[at - 1]);
}

/**
 * A step between days is long when it is more than ten median steps, more than three times the 95th percentile, and
 * more than chance brings about: of n steps between cases that come independently, with mean m ≈ median / ln 2, one
 * exceeds m (ln n + 5) with a chance of e⁻⁵, under 1 % (exponential waiting times; Feller 1971, volume 2, section I.3).
 */
function longStep(steps: Float64Array): number {
  const ordered = steps.slice().sort();
  const middle = quantileOf(ordered, 0.5);
  return Math.max(10 * middle, 3 * quantileOf(ordered, 0.95), (middle / Math.LN2) * (Math.log(steps.length) + 5));
}

/** Spans without a record that are long beside the usual step: the five longest, in their order. Cost: one sort. */
export function findTimeGaps({ name, values }: DateRecordColumn): Finding[] {
  const days = sortedDays(values);
  if (days.length < fewestDays) return [];
  const steps = days.subarray(1).map((day, at) => day - days[at]);
  const long = longStep(steps);
  return [...steps.keys()]
    .filter((at) => steps[at] > long)
    .sort((a, b) => steps[b] - steps[a])
    .slice(0, toldGaps)
    .sort((a, b) => a - b)
    .map((at) => toFinding(name, values, [days[at], days[at + 1]]));
}

function toFinding(name: string, values: Float64Array, [last, first]: readonly [number, number]): Finding {
  const rows: number[] = [];
  let wholeDays = true;
  values.forEach((value, row) => {
    const day = Math.floor(value);
    if (day !== last && day !== first) return;
    rows.push(row);
    wholeDays &&= day === value;
  });
  return {
    kind: 'time-gap',
    columns: [name],
    message: `${name} has no record between ${dateText(last)} and ${dateText(first)}: ${first - last} days.`,
    remedy: 'Ask whether records are missing; if not, say in the description why there were none.',
    ...listRows(rows),
    where: wholeDays ? oneOfTexts(name, [dateText(last), dateText(first)]) : undefined,
  };
}
