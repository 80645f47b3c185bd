import { area, line } from 'd3-shape';
import type { FitResult, PathPoint } from '../../api/contract';
import { acrossScale, extentOf, ticksOf, upScale, type PlotFrame, type Tick } from './plot-frame';

export type PenaltyAxis = 'log-lambda' | 'degrees-of-freedom';

export interface CrossValidationMark {
  readonly kind: 'chosen' | 'minimum' | 'one-standard-error';
  readonly words: string;
  readonly at: number;
  readonly lambda: number;
  readonly labelAt: number;
  readonly labelSide: 'start' | 'end';
}

export interface CrossValidationPlot {
  readonly curve: string;
  readonly band: string;
  readonly points: readonly {
    readonly at: number;
    readonly height: number;
    readonly low: number;
    readonly high: number;
  }[];
  readonly marks: readonly CrossValidationMark[];
  readonly across: readonly Tick[];
  readonly up: readonly Tick[];
}

export const crossValidationFrame: PlotFrame = { width: 640, height: 320, left: 56, right: 20, top: 60, bottom: 48 };

interface CurvePoint {
  readonly x: number;
  readonly error: number;
  readonly low: number;
  readonly high: number;
}

/**
 * The curve in the units of the target: the root of the mean squared held-out error, with its band carried through the
 * root end by end, √(error ± standard error).
 */
export function crossValidationPlot(
  result: FitResult,
  axis: PenaltyAxis,
  frame = crossValidationFrame,
): CrossValidationPlot | null {
  const points = result.path.flatMap((point) => curvePoint(point, axis)).sort((left, right) => left.x - right.x);
  if (points.length < 2) return null;
  const across = acrossScale(frame, extentOf(points.map((point) => point.x)));
  const up = upScale(frame, extentOf(points.flatMap((point) => [point.low, point.high])));
  const curve = line<CurvePoint>(
    (point) => across(point.x),
    (point) => up(point.error),
  );
  const band = area<CurvePoint>(
    (point) => across(point.x),
    (point) => up(point.low),
    (point) => up(point.high),
  );
  return {
    curve: curve(points) ?? '',
    band: band(points) ?? '',
    points: points.map((point) => ({
      at: across(point.x),
      height: up(point.error),
      low: up(point.low),
      high: up(point.high),
    })),
    marks: marksOf(result, axis, across, frame),
    across: ticksOf(across, 6),
    up: ticksOf(up, 5),
  };
}

function curvePoint(point: PathPoint, axis: PenaltyAxis): readonly CurvePoint[] {
  const x = positionOf(point.lambda, point.effectiveDegreesOfFreedom, axis);
  if (point.cvError === null || x === null) return [];
  const spread = point.cvStandardError ?? 0;
  return [
    {
      x,
      error: Math.sqrt(point.cvError),
      low: Math.sqrt(Math.max(0, point.cvError - spread)),
      high: Math.sqrt(point.cvError + spread),
    },
  ];
}

function positionOf(lambda: number, degreesOfFreedom: number, axis: PenaltyAxis): number | null {
  if (axis === 'degrees-of-freedom') return degreesOfFreedom;
  return lambda > 0 ? Math.log10(lambda) : null;
}

function marksOf(
  result: FitResult,
  axis: PenaltyAxis,
  across: (x: number) => number,
  frame: PlotFrame,
): readonly CrossValidationMark[] {
  const { lambda, minimumLambda, oneStandardErrorLambda } = result.penalty;
  const wanted = [
    { kind: 'chosen' as const, words: 'chosen', lambda },
    { kind: 'minimum' as const, words: 'minimum', lambda: minimumLambda },
    { kind: 'one-standard-error' as const, words: 'one standard error', lambda: oneStandardErrorLambda },
  ];
  return wanted.flatMap((mark, order) => {
    if (mark.lambda === null || mark.lambda === undefined) return [];
    const x = positionOf(mark.lambda, degreesAt(result, mark.lambda), axis);
    if (x === null) return [];
    const at = Math.min(frame.width - frame.right, Math.max(frame.left, across(x)));
    const labelSide = at > (frame.left + frame.width - frame.right) / 2 ? ('end' as const) : ('start' as const);
    return [{ kind: mark.kind, words: mark.words, lambda: mark.lambda, at, labelAt: 16 + order * 16, labelSide }];
  });
}

/** Effective degrees of freedom at a λ: those of the nearest point of the path on the log scale, or of the fit itself. */
export function degreesAt(result: FitResult, lambda: number): number {
  if (lambda === result.penalty.lambda) return result.penalty.effectiveDegreesOfFreedom;
  const distance = (point: PathPoint): number =>
    point.lambda > 0 && lambda > 0 ? Math.abs(Math.log(point.lambda / lambda)) : Math.abs(point.lambda - lambda);
  return [...result.path].sort((left, right) => distance(left) - distance(right))[0]?.effectiveDegreesOfFreedom ?? 0;
}
