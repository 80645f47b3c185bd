import { MeasuredValue, Precision, roundTo } from '../format/precision';

/** Places are shares of the bar's length, 0 at its left end; an end that is not bounded runs to the end of the axis. */
export interface IntervalBarLayout {
  readonly from: number;
  readonly to: number;
  readonly value: number;
  readonly openLow: boolean;
  readonly openHigh: boolean;
  readonly marks: readonly { readonly at: number; readonly value: number; readonly kind: 'end' | 'axis' }[];
}

/** The axis leaves this many widths of the interval free on either side. */
const FREE = 0.75;

/** Null where neither end is known: there is no bar to draw. */
export function layoutIntervalBar(measured: MeasuredValue, { endStep }: Precision): IntervalBarLayout | null {
  const { value, low, high } = measured;
  if (low === null && high === null) {
    return null;
  }
  const [left, right] = [low ?? value, high ?? value];
  const span = right - left || Math.abs(value) || 1;
  const axisLow = roundTo(left >= 0 ? Math.max(0, left - FREE * span) : left - FREE * span, endStep);
  const axisHigh = roundTo(right + FREE * span, endStep);
  const at = (place: number): number => (place - axisLow) / (axisHigh - axisLow);
  const ends = [low, high].filter((end): end is number => end !== null);
  return {
    from: low === null ? 0 : at(low),
    to: high === null ? 1 : at(high),
    value: at(value),
    openLow: low === null,
    openHigh: high === null,
    marks: [
      ...ends.map((end) => ({ at: at(end), value: end, kind: 'end' as const })),
      ...(low !== null && at(low) > 0.15 ? [{ at: 0, value: axisLow, kind: 'axis' as const }] : []),
      ...(high !== null ? [{ at: 1, value: axisHigh, kind: 'axis' as const }] : []),
    ],
  };
}
