import { acrossScale, extentOf, ticksOf, upScale, type PlotFrame, type Tick } from './plot-frame';

export type HeldOutView = 'record' | 'residual';

export interface HeldOutPoint {
  readonly recorded: number;
  readonly estimate: number;
}

export interface HeldOutPlot {
  readonly points: readonly { readonly at: number; readonly height: number }[];
  /** Where estimate and record agree. */
  readonly agreement: { readonly x1: number; readonly y1: number; readonly x2: number; readonly y2: number };
  readonly across: readonly Tick[];
  readonly up: readonly Tick[];
}

export const heldOutFrame: PlotFrame = { width: 640, height: 420, left: 64, right: 20, top: 28, bottom: 48 };

/** Record (or record minus estimate) against the estimate of the fold that had not seen the record. */
export function heldOutPlot(
  records: readonly HeldOutPoint[],
  view: HeldOutView,
  frame = heldOutFrame,
): HeldOutPlot | null {
  if (records.length < 2) return null;
  const heightOf = ({ recorded, estimate }: HeldOutPoint): number =>
    view === 'record' ? recorded : recorded - estimate;
  const [least, greatest] = extentOf(records.map((record) => record.estimate));
  const across = acrossScale(frame, [least, greatest]);
  const line = view === 'record' ? [least, greatest] : [0, 0];
  const up = upScale(frame, extentOf([...records.map(heightOf), ...line]));
  return {
    points: records.map((record) => ({ at: across(record.estimate), height: up(heightOf(record)) })),
    agreement: { x1: across(least), y1: up(line[0]), x2: across(greatest), y2: up(line[1]) },
    across: ticksOf(across, 6),
    up: ticksOf(up, 6),
  };
}
