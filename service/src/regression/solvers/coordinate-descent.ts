import { DUALITY_GAP } from '../conventions';
import { ActiveSetSolver } from './active-set';
import { allowedPull, bestWeight, relativeGap, type HeldPenalty } from './held-penalty';
import type { HeldProblem } from './project-free';

export interface DescentAnswer {
  readonly weights: Float64Array;
  readonly gap: number;
  readonly iterations: number;
  readonly converged: boolean;
}

/** Carried from one λ to the next, weaker one. */
export interface DescentState {
  readonly weights: Float64Array;
  /** c − A b for every held column. */
  readonly gradient: Float64Array;
  readonly exact: ActiveSetSolver;
}

const MOST_SWEEPS = 20000;
/** Sweeps before the gap is looked at again, and before an exact solution on the active set is tried. */
const SWEEPS_A_ROUND = 4;
/** So many sweeps at one λ may mean that the kept factor has lost digits: it is built afresh. */
const SWEEPS_BEFORE_RESET = 400;
/** A sweep whose largest curvature · step² is below this share of yy has settled; the gap then decides. */
const TINY_STEP = 1e-16;
/** Active sets up to this size are solved exactly when descent has not settled in its first round; a square penalty changes the factor at every λ. */
const MOST_POLISHED = { lasso: 3000, elasticNet: 400 } as const;

export function startingState(held: HeldProblem): DescentState {
  return { weights: new Float64Array(held.size), gradient: held.cross.slice(), exact: new ActiveSetSolver() };
}

/**
 * Elastic net by coordinate descent with covariance updates (Friedman, Hastie and Tibshirani 2010) on a working set found by
 * the sequential strong rule and extended until no column outside violates its condition (Tibshirani et al. 2012), stopped
 * by the relative duality gap. When it is slow, or `polish` asks for it, the weights are solved exactly on the active set.
 * Updates `state` in place. `previous` is the penalty of the λ before, for the strong rule; null starts with no screening.
 */
export function descend(
  held: HeldProblem,
  penalty: HeldPenalty,
  previous: HeldPenalty | null,
  state: DescentState,
  polish: boolean,
): DescentAnswer {
  const working = workingSet(held, penalty, previous, state);
  const inside = new Uint8Array(held.size);
  working.forEach((j) => (inside[j] = 1));
  const most = penalty.square.some((value) => value > 0) ? MOST_POLISHED.elasticNet : MOST_POLISHED.lasso;
  const followed = followExactly(held, penalty, state, most, polish);
  if (followed !== null) return followed;
  let iterations = 0;
  let polished = false;
  for (;;) {
    iterations += sweepRound(held, penalty, state, working);
    if (polish || iterations >= SWEEPS_A_ROUND) polished = state.exact.solve(held, penalty, state.weights, most);
    if (iterations > SWEEPS_BEFORE_RESET) state.exact.reset();
    refreshGradient(held, state);
    if (addViolators(held, penalty, state, working, inside)) continue;
    const gap = relativeGap(held, penalty, state.weights, state.gradient);
    const enough = gap <= DUALITY_GAP && (!polish || polished || gap <= DUALITY_GAP * 1e-4);
    if (enough || iterations >= MOST_SWEEPS) {
      return { weights: state.weights.slice(), gap, iterations, converged: gap <= DUALITY_GAP };
    }
  }
}

/** Active sets from this size on are followed exactly from λ to λ; sweeps would bring columns in only to lose them again. */
const LEAST_FOLLOWED = 40;
const MOST_ROUNDS = 60;

/**
 * Lasso with a large active set: solve exactly with the signs as they are, let every column outside that violates its condition
 * take one descent step, and again, until none does. Null where that does not apply or does not end; sweeps then go on.
 */
function followExactly(
  held: HeldProblem,
  penalty: HeldPenalty,
  state: DescentState,
  most: number,
  polish: boolean,
): DescentAnswer | null {
  const { weights, gradient } = state;
  const used = weights.reduce((count, weight) => count + (weight === 0 ? 0 : 1), 0);
  if (used < LEAST_FOLLOWED || most !== MOST_POLISHED.lasso) return null;
  for (let round = 1; round <= MOST_ROUNDS; round += 1) {
    if (!state.exact.solve(held, penalty, weights, most)) return null;
    refreshGradient(held, state);
    const violating = Array.from(weights.keys()).filter(
      (j) => weights[j] === 0 && allowedPull(gradient[j], penalty.signs[j]) > penalty.absolute[j] * (1 + 1e-9),
    );
    const gap = relativeGap(held, penalty, weights, gradient);
    if (gap <= DUALITY_GAP && (!polish || violating.length === 0)) {
      return { weights: weights.slice(), gap, iterations: round, converged: true };
    }
    if (violating.length === 0) return null;
    sweepOnce(held, penalty, state, violating, violating);
  }
  return null;
}

/** Columns in use, and those that may come in: pull ≥ 2·threshold − previous threshold. */
function workingSet(
  held: HeldProblem,
  penalty: HeldPenalty,
  previous: HeldPenalty | null,
  state: DescentState,
): number[] {
  const working: number[] = [];
  for (let j = 0; j < held.size; j += 1) {
    const screen = previous === null ? 0 : 2 * penalty.absolute[j] - previous.absolute[j];
    if (state.weights[j] !== 0 || allowedPull(state.gradient[j], penalty.signs[j]) >= screen) working.push(j);
  }
  return working;
}

/** One sweep over the working set, then over its active part until steps are tiny, at most a round's worth. Returns the sweeps made. */
function sweepRound(held: HeldProblem, penalty: HeldPenalty, state: DescentState, working: readonly number[]): number {
  const limit = TINY_STEP * held.targetSquare;
  for (let sweep = 1; sweep < SWEEPS_A_ROUND; sweep += 1) {
    if (sweepOnce(held, penalty, state, working, working) <= limit) return sweep;
    const active = working.filter((j) => state.weights[j] !== 0);
    for (; sweep < SWEEPS_A_ROUND; sweep += 1) if (sweepOnce(held, penalty, state, active, working) <= limit) break;
  }
  return SWEEPS_A_ROUND;
}

/** One sweep; returns the largest curvature · step². */
function sweepOnce(
  held: HeldProblem,
  penalty: HeldPenalty,
  state: DescentState,
  columns: readonly number[],
  working: readonly number[],
): number {
  const { gram, size } = held;
  const { weights, gradient } = state;
  let largest = 0;
  for (let at = 0; at < columns.length; at += 1) {
    const j = columns[at];
    const curvature = gram[j * size + j];
    const old = weights[j];
    const next = curvature > 0 ? bestWeight(gradient[j] + curvature * old, curvature, penalty, j) : 0;
    const step = next - old;
    if (step === 0) continue;
    weights[j] = next;
    const row = j * size;
    for (let other = 0; other < working.length; other += 1)
      gradient[working[other]] -= step * gram[row + working[other]];
    largest = Math.max(largest, curvature * step * step);
  }
  return largest;
}

/** gradient = c − A b for all held columns, afresh. */
function refreshGradient(held: HeldProblem, { weights, gradient }: DescentState): void {
  const { size, gram, cross } = held;
  gradient.set(cross);
  for (let k = 0; k < size; k += 1) {
    const weight = weights[k];
    if (weight === 0) continue;
    const row = k * size;
    for (let j = 0; j < size; j += 1) gradient[j] -= weight * gram[row + j];
  }
}

function addViolators(
  held: HeldProblem,
  penalty: HeldPenalty,
  state: DescentState,
  working: number[],
  inside: Uint8Array,
): boolean {
  let added = false;
  for (let j = 0; j < held.size; j += 1) {
    if (inside[j] === 1 || allowedPull(state.gradient[j], penalty.signs[j]) <= penalty.absolute[j]) continue;
    inside[j] = 1;
    working.push(j);
    added = true;
  }
  return added;
}
