import { line } from 'd3-shape';
import type { FitResult, Weight } from '../../api/contract';
import { acrossScale, extentOf, ticksOf, upScale, type PlotFrame, type Tick } from './plot-frame';

export interface PathLine {
  readonly name: string;
  readonly drawn: string;
  /** The largest at the chosen point are labelled and drawn in ink; the rest stay faint behind them. */
  readonly labelled: boolean;
  readonly dash: string;
  readonly labelAt: number;
  readonly endAt: number;
}

export interface PenaltyPathPlot {
  readonly lines: readonly PathLine[];
  readonly chosenAt: number;
  readonly chosenWords: string;
  readonly chosenSide: 'start' | 'end';
  readonly zeroAt: number;
  readonly across: readonly Tick[];
  readonly up: readonly Tick[];
  readonly leftOut: number;
}

export const penaltyPathFrame: PlotFrame = { width: 640, height: 380, left: 56, right: 150, top: 28, bottom: 48 };

const labelledLines = 9;
const drawnLines = 60;
const labelGap = 15;
const dashes = ['', '6 3', '2 3', '9 3 2 3'];

export function weightName(weight: Weight): string {
  const part = weight.level ?? weight.term;
  return part ? `${weight.input}: ${part}` : weight.input;
}

/** Standardised weights against effective degrees of freedom. */
export function penaltyPathPlot(result: FitResult, frame = penaltyPathFrame): PenaltyPathPlot | null {
  const points = [...result.path].sort(
    (left, right) => left.effectiveDegreesOfFreedom - right.effectiveDegreesOfFreedom,
  );
  if (points.length < 2) return null;
  const order = byImportance(
    result,
    points.map((point) => point.standardised),
  );
  const drawn = order.slice(0, drawnLines);
  const across = acrossScale(frame, extentOf(points.map((point) => point.effectiveDegreesOfFreedom)));
  const up = upScale(
    frame,
    extentOf([0, ...points.flatMap((point) => drawn.map((position) => point.standardised[position] ?? null))]),
  );
  const last = points[points.length - 1];
  const labels = spreadLabels(
    drawn.slice(0, labelledLines).map((position) => ({ position, wanted: up(last.standardised[position] ?? 0) })),
    [frame.top, frame.height - frame.bottom],
  );
  const chosenAt = across(result.penalty.effectiveDegreesOfFreedom);
  return {
    lines: drawn.map((position, rank) => {
      const path = line<(typeof points)[number]>(
        (point) => across(point.effectiveDegreesOfFreedom),
        (point) => up(point.standardised[position] ?? 0),
      );
      const endAt = up(last.standardised[position] ?? 0);
      return {
        name: weightName(result.weights[position]),
        drawn: path(points) ?? '',
        labelled: labels.has(position),
        dash: rank < labelledLines ? dashes[rank % dashes.length] : '',
        endAt,
        labelAt: labels.get(position) ?? endAt,
      };
    }),
    chosenAt,
    chosenWords: 'chosen',
    chosenSide: chosenAt > (frame.left + frame.width - frame.right) / 2 ? 'end' : 'start',
    zeroAt: up(0),
    across: ticksOf(across, 6),
    up: ticksOf(up, 6),
    leftOut: order.length - drawn.length,
  };
}

/** Positions of the weights, largest at the chosen point first; ties by their largest along the path. */
function byImportance(result: FitResult, path: readonly (readonly number[])[]): readonly number[] {
  const largest = result.weights.map((_, position) =>
    path.reduce((most, row) => Math.max(most, Math.abs(row[position] ?? 0)), 0),
  );
  const chosen = result.weights.map((weight) => Math.abs(weight.standardised));
  return result.weights
    .map((_, position) => position)
    .filter((position) => largest[position] > 0)
    .sort((left, right) => chosen[right] - chosen[left] || largest[right] - largest[left]);
}

/** Moves labels apart from the top down, then back up from the lower edge, so that none overlaps another. */
export function spreadLabels(
  labels: readonly { readonly position: number; readonly wanted: number }[],
  [top, bottom]: readonly [number, number],
): ReadonlyMap<number, number> {
  const placed = [...labels]
    .sort((left, right) => left.wanted - right.wanted)
    .map((label) => ({ ...label, at: label.wanted }));
  let floor = top - labelGap;
  for (const label of placed) {
    label.at = Math.max(label.wanted, floor + labelGap);
    floor = label.at;
  }
  let ceiling = bottom + labelGap;
  for (const label of placed.reverse()) {
    label.at = Math.min(label.at, ceiling - labelGap);
    ceiling = label.at;
  }
  return new Map(placed.map((label) => [label.position, label.at]));
}
