import type { StandardisedRows } from '../design/standardised-rows';
import { activeDegrees } from './active-degrees';
import { ActiveSetSolver } from './active-set';
import type { ColumnPenalties } from './column-penalties';
import { descend } from './coordinate-descent';
import { allowedPull, relativeGap, type HeldPenalty } from './held-penalty';
import type { HeldProblem } from './project-free';
import type { PathSolution, SolverSettings } from './solve-path';
import { crossWith, dotAt, wideProblem, type WideProblem } from './wide-problem';

/**
 * Elastic net with more columns than can have a products matrix: descent on a working set whose products are formed as columns
 * enter (strong rule, then every column that violates its condition), the gradient of all columns from the residuals.
 * Cost a λ: a few passes over the data, plus products of new working columns.
 */
export function descendWide(
  source: StandardisedRows,
  penalties: ColumnPenalties,
  settings: SolverSettings,
  lambdas: readonly number[],
): PathSolution {
  const problem = wideProblem(source, penalties);
  const state = new WideState(problem);
  const outcome = { weights: [] as Float64Array[], degreesOfFreedom: [] as number[], gaps: [] as number[] };
  let iterations = 0;
  let converged = true;
  let previous: HeldPenalty | null = null;
  for (const lambda of lambdas) {
    const penalty = widePenalty(problem, penalties, settings.mixing, lambda);
    state.screen(penalty, previous);
    const solved = state.solve(penalty, settings.polish);
    outcome.weights.push(problem.restore(state.weights));
    if (settings.polish) outcome.degreesOfFreedom.push(problem.freeCount + state.degrees(penalty));
    outcome.gaps.push(solved.gap);
    iterations += solved.iterations;
    converged &&= solved.converged;
    previous = penalty;
  }
  return { ...outcome, iterations, converged, dependent: [] };
}

function widePenalty(problem: WideProblem, penalties: ColumnPenalties, mixing: number, lambda: number): HeldPenalty {
  const factors = Float64Array.from(problem.held, (column) => penalties.factors[column]);
  return {
    absolute: factors.map((factor) => lambda * mixing * factor),
    square: factors.map((factor) => lambda * (1 - mixing) * factor),
    signs: problem.held.map((column) => penalties.signs[column]),
  };
}

class WideState {
  readonly weights: Float64Array;
  private gradient: Float64Array;
  private readonly working: number[] = [];
  private readonly inside: Uint8Array;
  /** Products of working columns, one growing row each: products[i][j] for j ≤ i. */
  private readonly products: Float64Array[] = [];
  /** Keyed by place in `working`, which only grows. */
  private readonly exact = new ActiveSetSolver();

  constructor(private readonly problem: WideProblem) {
    this.weights = new Float64Array(problem.held.length);
    this.gradient = problem.cross.slice();
    this.inside = new Uint8Array(problem.held.length);
  }

  /** Sequential strong rule: pull ≥ 2·threshold − previous threshold. */
  screen(penalty: HeldPenalty, previous: HeldPenalty | null): void {
    for (let j = 0; j < this.weights.length; j += 1) {
      const screen = previous === null ? penalty.absolute[j] : 2 * penalty.absolute[j] - previous.absolute[j];
      if (this.inside[j] === 0 && allowedPull(this.gradient[j], penalty.signs[j]) >= screen) this.enter(j);
    }
  }

  solve(penalty: HeldPenalty, polish: boolean): { gap: number; iterations: number; converged: boolean } {
    let iterations = 0;
    let converged = true;
    for (;;) {
      const answer = this.solveWorking(penalty, polish);
      iterations += answer.iterations;
      converged = answer.converged;
      this.refreshGradient();
      if (!this.enterViolators(penalty)) break;
    }
    return { gap: relativeGap(this.asHeld(), penalty, this.weights, this.gradient), iterations, converged };
  }

  degrees(penalty: HeldPenalty): number {
    const compact = this.compact();
    return activeDegrees(
      compact,
      pickPenalty(penalty, this.working),
      Float64Array.from(this.working, (j) => this.weights[j]),
    );
  }

  private solveWorking(penalty: HeldPenalty, polish: boolean): ReturnType<typeof descend> {
    const compact = this.compact();
    const weights = Float64Array.from(this.working, (j) => this.weights[j]);
    const gradient = Float64Array.from(this.working, (j) => this.gradient[j]);
    const answer = descend(
      compact,
      pickPenalty(penalty, this.working),
      null,
      { weights, gradient, exact: this.exact },
      polish,
    );
    this.working.forEach((j, at) => (this.weights[j] = answer.weights[at]));
    return answer;
  }

  private enter(j: number): void {
    const { x, rows, weightSum } = this.problem;
    this.inside[j] = 1;
    this.working.push(j);
    this.products.push(
      Float64Array.from(this.working, (other) => dotAt(x, j * rows, x, other * rows, rows) / weightSum),
    );
  }

  private enterViolators(penalty: HeldPenalty): boolean {
    const before = this.working.length;
    for (let j = 0; j < this.weights.length; j += 1) {
      if (this.inside[j] === 0 && allowedPull(this.gradient[j], penalty.signs[j]) > penalty.absolute[j]) this.enter(j);
    }
    return this.working.length > before;
  }

  /** gradient = Xᵀ(y − Xb)/n. */
  private refreshGradient(): void {
    const { x, y, rows, held, weightSum } = this.problem;
    const residual = y.slice();
    for (const j of this.working) {
      const weight = this.weights[j];
      if (weight === 0) continue;
      for (let row = 0; row < rows; row += 1) residual[row] -= weight * x[j * rows + row];
    }
    this.gradient = crossWith(x, rows, held.length, residual, weightSum);
  }

  private compact(): HeldProblem {
    const size = this.working.length;
    const gram = new Float64Array(size * size);
    this.products.forEach((row, i) =>
      row.forEach((value, j) => {
        gram[i * size + j] = value;
        gram[j * size + i] = value;
      }),
    );
    const { cross, targetSquare } = this.problem;
    return {
      size,
      held: this.working,
      gram,
      cross: Float64Array.from(this.working, (j) => cross[j]),
      targetSquare,
      freeCount: 0,
      restore: (weights) => Float64Array.from(weights),
    };
  }

  /** For the gap, which needs no products. */
  private asHeld(): HeldProblem {
    const { cross, held, targetSquare } = this.problem;
    return {
      size: held.length,
      held,
      gram: new Float64Array(0),
      cross,
      targetSquare,
      freeCount: 0,
      restore: (weights) => Float64Array.from(weights),
    };
  }
}

function pickPenalty(penalty: HeldPenalty, columns: readonly number[]): HeldPenalty {
  return {
    absolute: Float64Array.from(columns, (j) => penalty.absolute[j]),
    square: Float64Array.from(columns, (j) => penalty.square[j]),
    signs: columns.map((j) => penalty.signs[j]),
  };
}
