import { shapeOf, toColumnModel, type Moments } from './design/moments';
import { resolveSpecification } from './design/resolve-specification';
import { RegressionError } from './errors';
import { allRows, prepareContext, segmentMoments, type FitContext } from './fit-context';
import { buildFormula } from './formula/build-formula';
import type { Formula } from './formula/formula';
import { assembleResult, gaussianOf, leverageOf, type FinishedFit } from './fit-result';
import { holdOut, smearingOf } from './inference/held-out';
import { hatFeatures } from './inference/hat-features';
import { leaveOneOutErrors } from './inference/leave-one-out';
import { leaveOneOutErrorsWide } from './inference/leave-one-out-wide';
import { leverageMatrix } from './inference/lever';
import { nestedError } from './inference/nested';
import type { RecordTable } from './records';
import type { FitResult } from './result';
import { choosePenalty } from './selection/choice';
import { generalisedErrors, planPenalty, type PenaltyPlan } from './selection/choose-penalty';
import { combineFolds, type CrossValidation } from './selection/cross-validation';
import { runFoldPaths } from './selection/fold-runs';
import { trainingPart, type FoldAnswer, type FoldTask } from './selection/fold-task';
import { losesDigits } from './selection/route';
import { freePositions, type ColumnPenalties } from './solvers/column-penalties';
import { leastSquaresInOriginalUnits } from './solvers/original-units';
import { solvePath, type PathSolution, type TrainingPart } from './solvers/solve-path';
import type { FitSpecification } from './specification';

export interface FitProgress {
  readonly stage: 'reading' | 'moments' | 'path' | 'validation' | 'diagnostics';
  readonly done: number;
  readonly total: number;
}

/** What the surroundings may lend to a fit; the numbers do not depend on it. */
export interface FitHooks {
  readonly onProgress?: (progress: FitProgress) => void;
  /** Runs independent pieces elsewhere (worker threads) with `runFoldTask`; answers come back in the order of the tasks. */
  readonly runFolds?: (tasks: readonly FoldTask[]) => Promise<readonly FoldAnswer[]>;
}

export interface FittedRecords {
  readonly result: FitResult;
  readonly formula: Formula;
}

/**
 * Fits one specification to one table of records. The conventions are those of conventions.ts. Pure: no clock, no files; the
 * same records and specification give the same bits. Throws RegressionError.
 */
export async function fitRecords(
  records: RecordTable,
  specification: FitSpecification,
  hooks: FitHooks = {},
): Promise<FittedRecords> {
  hooks.onProgress?.({ stage: 'reading', done: 0, total: records.rowCount });
  const context = prepareContext(records, resolveSpecification(specification), hooks);
  const fit = await finishFit(await readyForPath(context));
  context.progress({ stage: 'diagnostics', done: 0, total: 1 });
  const lever = fit.lever;
  const formula = buildFormula(fit.context, {
    model: fit.model,
    smearing: fit.smearing,
    heldOut: fit.heldOut,
    gaussian: gaussianOf(fit),
    leverage: lever === null ? null : leverageOf(fit, lever),
  });
  const result = assembleResult(fit);
  context.progress({ stage: 'diagnostics', done: 1, total: 1 });
  return { result, formula };
}

interface ReadyFit {
  readonly context: FitContext;
  readonly moments: readonly Moments[];
  readonly part: TrainingPart;
  readonly plan: PenaltyPlan;
}

/** The records as the solvers want them; moments give way to the orthogonal route where they would lose digits. */
async function readyForPath(context: FitContext): Promise<ReadyFit> {
  const { design, specification } = context;
  const moments = await segmentMoments(context);
  const part = trainingPart(design, context.route, allRows(context), moments);
  context.progress({ stage: 'path', done: 0, total: 1 });
  const plan = planPenalty(part, design.columns, specification, context.settings.kind);
  if (context.route !== 'moments' || !losesDigits(part, plan, context.settings.kind))
    return { context, moments, part, plan };
  return readyForPath({ ...context, route: 'orthogonal' });
}

async function finishFit({ context, moments, part, plan }: ReadyFit): Promise<FinishedFit> {
  const { design, specification, settings } = context;
  const answers = await runFoldPaths(context, moments, plan.lambdas);
  const crossValidation = combineFolds(answers, plan.lambdas.length);
  const choice = choosePenalty(groundOf(context, part, plan, crossValidation), specification.penalty.rule);
  const solution = solvePath(part, design.columns, settings, plan.lambdas);
  refuseDependent(context, part, solution);
  const lambda = plan.lambdas[choice.at];
  const weights = solution.weights[choice.at];
  const exact = settings.kind === 'least-squares' && context.route === 'orthogonal';
  const original = exact ? leastSquaresInOriginalUnits(context.read, design, context.plan) : null;
  const model = original?.model ?? toColumnModel(part.problem, weights, shapeOf(design));
  const heldOut = holdOut(
    context,
    answers.map((answer) => answer.models[choice.at]),
  );
  const all = context.plan.segmentStarts.slice(0, -1).map((_, segment) => segment);
  return {
    context,
    part,
    plan,
    crossValidation,
    choice,
    solution,
    lambda,
    weights,
    model,
    original,
    heldOut,
    smearing: specification.target.transform === 'log' ? smearingOf(context, design, model, all) : 1,
    lever: leverageMatrix({ context, part, penalties: plan.penalties, lambda, weights, dependent: solution.dependent }),
    foldsConverged: answers.every((answer) => answer.converged),
    nestedRmse:
      specification.extras.nestedFolds === true ? await nestedError(context, moments, plan.lambdas, answers) : null,
  };
}

/** Multiplications of leave-one-out errors that are cheap enough to give them unasked. */
const CHEAP_LEAVE_ONE_OUT = 1e8;

function groundOf(
  context: FitContext,
  part: TrainingPart,
  plan: PenaltyPlan,
  crossValidation: CrossValidation,
): Parameters<typeof choosePenalty>[0] {
  const { specification, settings } = context;
  const { lambdas, form } = plan;
  const plainRidge = form !== null && settings.kind === 'ridge';
  return {
    lambdas,
    crossValidation,
    generalised: plainRidge ? generalisedErrors(form, part.problem.weightSum, specification.intercept, lambdas) : null,
    leaveOneOut: plainRidge ? leaveOneOutOf(context, part, plan) : null,
    evidence: plan.evidence?.lambda ?? null,
    settled: plan.settled,
  };
}

/** Given unasked where that is cheap; by records where inputs outnumber them, and then only when asked for. */
function leaveOneOutOf(context: FitContext, part: TrainingPart, plan: PenaltyPlan): number[] | null {
  const { specification, design, read, route } = context;
  const { lambdas, penalties } = plan;
  const asked = specification.penalty.rule === 'leave-one-out';
  if (route === 'wide') {
    if (!asked || part.rows === null) return null;
    refuseFreeColumns(penalties);
    return leaveOneOutErrorsWide(part.rows, penalties, specification.intercept, lambdas);
  }
  const cost = read.count * part.problem.size * (part.problem.size + lambdas.length);
  if (!asked && cost > CHEAP_LEAVE_ONE_OUT) return null;
  return leaveOneOutErrors(design, part.problem, hatFeatures(part.problem, penalties), lambdas);
}

/** By records, free columns would have to be projected out of the rows, which then are no records any more. */
function refuseFreeColumns(penalties: ColumnPenalties): void {
  if (freePositions(penalties).length === 0) return;
  throw new RegressionError(
    'bad-specification',
    'Leave-one-out is not offered for inputs left free among more inputs than records. Hold them, or choose generalised cross-validation or folds.',
  );
}

/** The final fit never drops a column silently: least squares with dependent inputs has no single answer. */
function refuseDependent(context: FitContext, part: TrainingPart, solution: PathSolution): void {
  if (solution.dependent.length === 0) return;
  const { columns } = context.design;
  const column = columns[part.problem.kept[solution.dependent[0]]];
  const name = context.specification.inputs[column.input].column;
  const label = column.label === undefined ? name : `${name} (${column.label})`;
  throw new RegressionError(
    'not-identifiable',
    `${label} is an exact combination of other inputs (or there are more inputs than records), so least squares has no single answer. Leave it out, or hold the weights with a penalty.`,
    name,
  );
}
