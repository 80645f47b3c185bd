import { buildDesign, sharedArray } from './design/build-design';
import type { DesignMatrix } from './design/design-matrix';
import type { Moments } from './design/moments';
import { findColumn } from './design/read-input';
import { readRecords, type ReadRecords } from './design/read-records';
import type { ResolvedSpecification } from './design/resolve-specification';
import type { RowSpan } from './design/standardised-rows';
import { RegressionError } from './errors';
import type { FitProgress } from './fit';
import type { RecordTable } from './records';
import { runFoldTask, type FoldAnswer, type FoldTask } from './selection/fold-task';
import { planFolds, type Fold, type FoldPlan } from './selection/folds';
import { chooseRoute, type Route } from './selection/route';
import { solverKind, type SolverSettings } from './solvers/solve-path';

export type TaskRunner = (tasks: readonly FoldTask[]) => Promise<readonly FoldAnswer[]>;

/** What every stage of a fit shares. */
export interface FitContext {
  readonly specification: ResolvedSpecification;
  readonly read: ReadRecords;
  readonly plan: FoldPlan;
  /** Coded with what all records say. */
  readonly design: DesignMatrix;
  readonly route: Route;
  readonly settings: SolverSettings;
  /** Whether a fold needs a design of its own (spline knots). */
  readonly designPerFold: boolean;
  readonly run: TaskRunner;
  /** Folds handed over together: one at a time on this thread, so that progress shows each. */
  readonly foldsAtOnce: number;
  readonly progress: (progress: FitProgress) => void;
}

export interface ContextHooks {
  readonly onProgress?: (progress: FitProgress) => void;
  readonly runFolds?: TaskRunner;
}

export function prepareContext(
  records: RecordTable,
  specification: ResolvedSpecification,
  hooks: ContextHooks,
): FitContext {
  const read = readRecords(records, specification);
  const { validation } = specification;
  const plan = planFolds(
    read.count,
    read.rows,
    validation,
    validation.column === null ? null : findColumn(records, validation.column),
  );
  const design = buildDesign(read, specification, plan, null);
  if (design.columns.every((column) => column.leftOut !== undefined)) {
    throw new RegressionError(
      'no-usable-input',
      'Every input has the same reading in all records, so nothing can be learnt from them.',
    );
  }
  const kind = solverKind(specification.method, design.columns);
  return {
    specification,
    read,
    plan,
    design,
    route: chooseRoute(design, kind),
    settings: { kind, mixing: specification.mixing, polish: true },
    designPerFold: specification.inputs.some((input) => input.transform === 'spline'),
    run: hooks.runFolds ?? runHere,
    foldsAtOnce: hooks.runFolds === undefined ? 1 : plan.folds.length,
    progress: hooks.onProgress ?? (() => undefined),
  };
}

async function runHere(tasks: readonly FoldTask[]): Promise<readonly FoldAnswer[]> {
  return tasks.map(runFoldTask);
}

export function spanOf(plan: FoldPlan, segment: number): RowSpan {
  return { start: plan.segmentStarts[segment], end: plan.segmentStarts[segment + 1] };
}

export function segmentSpans(plan: FoldPlan): RowSpan[] {
  return plan.segmentStarts.slice(0, -1).map((_, segment) => spanOf(plan, segment));
}

export function allRows(context: FitContext): RowSpan[] {
  return [{ start: 0, end: context.read.count }];
}

/** The design that a fold is coded with: its own where spline knots depend on its training records. */
export function designForFold(context: FitContext, fold: Fold): DesignMatrix {
  if (!context.designPerFold) return context.design;
  const { read, specification, plan } = context;
  const training = fold.training.flatMap((segment) =>
    Array.from(plan.order.subarray(plan.segmentStarts[segment], plan.segmentStarts[segment + 1])),
  );
  return buildDesign(read, specification, plan, Int32Array.from(training));
}

/** Sums of products of each segment; empty on the orthogonal route. */
export async function segmentMoments(context: FitContext): Promise<readonly Moments[]> {
  if (context.route !== 'moments') return [];
  const { design, plan } = context;
  context.progress({ stage: 'moments', done: 0, total: plan.segmentStarts.length - 1 });
  const answers = await context.run(segmentSpans(plan).map((span) => ({ kind: 'moments', design, span })));
  return answers.map((answer) => {
    if (answer.kind !== 'moments') throw new TypeError('A moments task was answered with something else.');
    // Shared, so that handing them to a worker thread copies nothing.
    const shared = sharedArray(answer.moments.length);
    shared.set(answer.moments);
    return shared;
  });
}
