import type { DesignMatrix } from '../design/design-matrix';
import {
  addMoments,
  squaredError,
  standardise,
  toColumnModel,
  shapeOf,
  type ColumnModel,
  type Moments,
} from '../design/moments';
import { sumOfSquares, weightedResiduals } from '../design/predict';
import { problemOfRows, standardisedRows, withoutGram, type RowSpan } from '../design/standardised-rows';
import { crossProduct } from '../linear-algebra/cross-product';
import { solvePath, type SolverSettings, type TrainingPart } from '../solvers/solve-path';
import type { Route } from './route';

/** Sums of products over one segment. */
export interface MomentsTask {
  readonly kind: 'moments';
  readonly design: DesignMatrix;
  readonly span: RowSpan;
}

/** The whole path on the training part of one fold, and its squared error on the held-out part. */
export interface PathTask {
  readonly kind: 'path';
  readonly design: DesignMatrix;
  readonly route: Route;
  readonly settings: SolverSettings;
  readonly lambdas: readonly number[];
  readonly training: readonly RowSpan[];
  readonly heldOut: readonly RowSpan[];
  /** Of the training and held-out segments, on the route by moments. */
  readonly trainingMoments: readonly Moments[];
  readonly heldOutMoments: readonly Moments[];
}

/** An independent piece of work that may run on another thread: plain data in, plain data out. */
export type FoldTask = MomentsTask | PathTask;

export interface MomentsAnswer {
  readonly kind: 'moments';
  readonly moments: Moments;
}

export interface PathAnswer {
  readonly kind: 'path';
  readonly models: readonly ColumnModel[];
  /** Σ w · residual² over the held-out records, one a λ. */
  readonly squaredErrors: Float64Array;
  readonly heldOutWeight: number;
  readonly iterations: number;
  readonly converged: boolean;
}

export type FoldAnswer = MomentsAnswer | PathAnswer;

/** What a worker thread calls for each task it is handed. */
export function runFoldTask(task: FoldTask): FoldAnswer {
  return task.kind === 'moments' ? { kind: 'moments', moments: momentsOf(task.design, task.span) } : runPath(task);
}

export function momentsOf(design: DesignMatrix, span: RowSpan): Moments {
  return crossProduct(design.data, design.columnCount + 2, { rowCount: design.rowCount, ...span });
}

/** The training records as the route needs them. */
export function trainingPart(
  design: DesignMatrix,
  route: Route,
  spans: readonly RowSpan[],
  moments: readonly Moments[],
): TrainingPart {
  const usable = design.columns.map((column) => column.leftOut === undefined);
  if (route === 'moments') return { problem: standardise(addMoments(moments), shapeOf(design), usable), rows: null };
  const rows = standardisedRows(design, spans, usable);
  return { problem: route === 'wide' ? withoutGram(rows) : problemOfRows(rows), rows };
}

function runPath(task: PathTask): PathAnswer {
  const { design } = task;
  const part = trainingPart(design, task.route, task.training, task.trainingMoments);
  const solution = solvePath(part, design.columns, task.settings, task.lambdas);
  const shape = shapeOf(design);
  const models = solution.weights.map((weights) => toColumnModel(part.problem, weights, shape));
  const heldOutWeight = task.heldOut.reduce((total, span) => total + weightOf(design, span), 0);
  return {
    kind: 'path',
    models,
    squaredErrors: Float64Array.from(models, (model) => heldOutError(task, model)),
    heldOutWeight,
    iterations: solution.iterations,
    converged: solution.converged,
  };
}

function weightOf(design: DesignMatrix, span: RowSpan): number {
  const at = design.columnCount * design.rowCount;
  return sumOfSquares(design.data.subarray(at + span.start, at + span.end));
}

/** Below this share of the target's square a squared error taken from moments has lost too many digits. */
const SAFE_SHARE = 1e-7;

function heldOutError(task: PathTask, model: ColumnModel): number {
  const records = task.heldOut.reduce((total, span) => total + span.end - span.start, 0);
  if (task.heldOutMoments.length > 0 && records > task.design.columnCount) {
    const width = task.design.columnCount + 2;
    const fromMoments = task.heldOutMoments.reduce((total, moments) => total + squaredError(moments, model), 0);
    const target = task.heldOutMoments.reduce((total, moments) => total + moments[width * width - 1], 0);
    if (fromMoments > SAFE_SHARE * target) return fromMoments;
  }
  return task.heldOut.reduce(
    (total, span) => total + sumOfSquares(weightedResiduals(task.design, model, span.start, span.end)),
    0,
  );
}
