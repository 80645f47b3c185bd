import type { SignLimit } from '../specification';
import type { ColumnPenalties } from './column-penalties';
import type { HeldProblem } from './project-free';

/** The penalty λ[α|b| + (1−α)/2 b²] of the held columns at one λ, with their sign limits. */
export interface HeldPenalty {
  readonly absolute: Float64Array;
  readonly square: Float64Array;
  readonly signs: readonly SignLimit[];
}

export function penaltyAt(held: HeldProblem, penalties: ColumnPenalties, mixing: number, lambda: number): HeldPenalty {
  const factors = Float64Array.from(held.held, (column) => penalties.factors[column]);
  return {
    absolute: factors.map((factor) => lambda * mixing * factor),
    square: factors.map((factor) => lambda * (1 - mixing) * factor),
    signs: held.held.map((column) => penalties.signs[column]),
  };
}

/** argmin over b of ½ curvature b² − pull b + absolute |b| + ½ square b², within the sign limit: soft thresholding. */
export function bestWeight(pull: number, curvature: number, penalty: HeldPenalty, column: number): number {
  const threshold = penalty.absolute[column];
  const sign = penalty.signs[column];
  if (pull > threshold) return sign === 'not-positive' ? 0 : (pull - threshold) / (curvature + penalty.square[column]);
  if (pull < -threshold) return sign === 'not-negative' ? 0 : (pull + threshold) / (curvature + penalty.square[column]);
  return 0;
}

/** How far a column at 0 is pulled in a direction that its sign limit allows. */
export function allowedPull(gradient: number, sign: SignLimit): number {
  if (sign === 'not-negative') return Math.max(0, gradient);
  if (sign === 'not-positive') return Math.max(0, -gradient);
  return Math.abs(gradient);
}

/**
 * Bound on (objective − optimum) ÷ ½yy. With an absolute penalty: the duality gap of the lasso with the square penalty taken
 * into the residual (Kim, Koh, Lustig, Boyd and Gorinevsky 2007; Massias, Gramfort and Salmon 2018). Without one (ridge with
 * sign limits): Σ v²/(2·square) from strong convexity, v the distance of 0 from the subgradient.
 * gradient = c − A b for every held column.
 */
export function relativeGap(
  held: HeldProblem,
  penalty: HeldPenalty,
  weights: Float64Array,
  gradient: Float64Array,
): number {
  if (held.targetSquare === 0) return 0;
  const scale = held.targetSquare / 2;
  let explained = 0,
    fitted = 0,
    absolute = 0,
    square = 0,
    worst = 1,
    slack = 0;
  for (let j = 0; j < held.size; j += 1) {
    const weight = weights[j];
    const pull = gradient[j] - penalty.square[j] * weight;
    explained += weight * held.cross[j];
    fitted += weight * (held.cross[j] - gradient[j]);
    absolute += penalty.absolute[j] * Math.abs(weight);
    square += penalty.square[j] * weight * weight;
    if (penalty.absolute[j] > 0) worst = Math.max(worst, allowedPull(pull, penalty.signs[j]) / penalty.absolute[j]);
    else slack += unpenalisedSlack(pull, weight, penalty, j, held);
  }
  const residual = held.targetSquare - 2 * explained + fitted + square;
  const shrink = 1 / worst;
  const dual = shrink * (held.targetSquare - explained) - (shrink * shrink * residual) / 2;
  const gap = hasAbsolute(penalty) ? Math.max(0, residual / 2 + absolute - dual) : 0;
  return (gap + slack) / scale;
}

function hasAbsolute(penalty: HeldPenalty): boolean {
  return penalty.absolute.some((value) => value > 0);
}

function unpenalisedSlack(pull: number, weight: number, penalty: HeldPenalty, j: number, held: HeldProblem): number {
  const violation = weight !== 0 ? Math.abs(pull) : allowedPull(pull, penalty.signs[j]);
  return penalty.square[j] > 0
    ? (violation * violation) / (2 * penalty.square[j])
    : violation * (Math.abs(weight) + Math.sqrt(held.targetSquare));
}
