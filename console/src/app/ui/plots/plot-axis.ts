import { ScaleLinear, scaleLinear } from 'd3-scale';
import { formatRecordedDay } from '../moment';
import { unitBeside } from '../unit-beside';

/** A column drawn along an axis. */
export interface PlotVariable {
  readonly name: string;
  readonly unit: string | null;
  /** Values are days since 1970-01-01. */
  readonly date: boolean;
}

export interface AxisTick {
  readonly at: number;
  readonly text: string;
}

export function axisLabel({ name, unit }: PlotVariable): string {
  const beside = unitBeside(name, unit);
  return beside ? `${name}, ${beside}` : name;
}

/** Maps what the values span onto the range; a single value stands in its middle. */
export function axisScale(values: readonly number[], range: readonly [number, number]): ScaleLinear<number, number> {
  const least = values.reduce((a, b) => Math.min(a, b), Infinity);
  const greatest = values.reduce((a, b) => Math.max(a, b), -Infinity);
  if (!(greatest >= least)) return scaleLinear([0, 1], range);
  const half = greatest > least ? 0 : Math.abs(least) / 2 || 1;
  return scaleLinear([least - half, greatest + half], range).nice(5);
}

export function axisTicks(scale: ScaleLinear<number, number>, about: number, date: boolean): readonly AxisTick[] {
  const format = scale.tickFormat(about);
  return scale
    .ticks(about)
    .map((value) => ({ at: scale(value), text: date ? formatRecordedDay(value) : format(value) }));
}
