import { scaleLinear, type ScaleLinear } from 'd3-scale';

/** Room of a plot in its own units; the drawing scales with its box. */
export interface PlotFrame {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export interface Tick {
  readonly at: number;
  readonly text: string;
}

/** Maps [from, to] onto the frame's width. A range of no width is opened, so that a single point stands in the middle. */
export function acrossScale(frame: PlotFrame, range: readonly [number, number]): ScaleLinear<number, number> {
  return scaleLinear()
    .domain(opened(range))
    .range([frame.left, frame.width - frame.right]);
}

export function upScale(frame: PlotFrame, range: readonly [number, number]): ScaleLinear<number, number> {
  return scaleLinear()
    .domain(opened(range))
    .nice(5)
    .range([frame.height - frame.bottom, frame.top]);
}

export function ticksOf(scale: ScaleLinear<number, number>, about: number): readonly Tick[] {
  const format = scale.tickFormat(about);
  return scale.ticks(about).map((value) => ({ at: scale(value), text: format(value) }));
}

/** Least and greatest of what is a number; [0, 1] when nothing is. */
export function extentOf(values: readonly (number | null)[]): readonly [number, number] {
  let least = Infinity;
  let greatest = -Infinity;
  for (const value of values) {
    if (value === null || !Number.isFinite(value)) continue;
    least = Math.min(least, value);
    greatest = Math.max(greatest, value);
  }
  return least <= greatest ? [least, greatest] : [0, 1];
}

function opened([from, to]: readonly [number, number]): [number, number] {
  if (to > from) return [from, to];
  const half = Math.abs(from) / 2 || 1;
  return [from - half, from + half];
}
