import type { Moments } from '../design/moments';
import { designForFold, spanOf, type FitContext } from '../fit-context';
import { momentsOf, type FoldAnswer, type PathAnswer, type PathTask } from './fold-task';
import type { Fold } from './folds';

/** The path on every fold. `moments` are those of the shared design's segments. Spline designs are built one fold at a time. */
export async function runFoldPaths(
  context: FitContext,
  moments: readonly Moments[],
  lambdas: readonly number[],
): Promise<PathAnswer[]> {
  const { folds } = context.plan;
  const answers: PathAnswer[] = [];
  const batch = context.designPerFold ? 1 : context.foldsAtOnce;
  for (let first = 0; first < folds.length; first += batch) {
    context.progress({ stage: 'validation', done: first, total: folds.length });
    const tasks = folds.slice(first, first + batch).map((fold) => pathTask(context, fold, moments, lambdas));
    answers.push(...(await context.run(tasks)).map(expectPath));
  }
  context.progress({ stage: 'validation', done: folds.length, total: folds.length });
  return answers;
}

function expectPath(answer: FoldAnswer): PathAnswer {
  if (answer.kind !== 'path') throw new TypeError('A path task was answered with something else.');
  return answer;
}

function pathTask(context: FitContext, fold: Fold, moments: readonly Moments[], lambdas: readonly number[]): PathTask {
  const { plan, route, settings } = context;
  const design = designForFold(context, fold);
  const momentsAt = (segment: number): Moments =>
    context.designPerFold ? momentsOf(design, spanOf(plan, segment)) : moments[segment];
  const used = (segments: readonly number[]): Moments[] => (route === 'moments' ? segments.map(momentsAt) : []);
  return {
    kind: 'path',
    design,
    route,
    settings: { ...settings, polish: false },
    lambdas,
    training: fold.training.map((segment) => spanOf(plan, segment)),
    heldOut: fold.heldOut.map((segment) => spanOf(plan, segment)),
    trainingMoments: used(fold.training),
    heldOutMoments: used(fold.heldOut),
  };
}
