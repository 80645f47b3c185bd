import type { FinishedFit } from '../fit-result';
import type { FitDiagnostics } from '../result';
import { collinearity, comparablePositions } from './collinearity';
import { sharedLoad } from './load-split';
import { learningCurve, selectionFrequency } from './resampling';
import { residualDiagnostics } from './residual-diagnostics';
import type { TrainingFit } from './training-fit';

/** Everything that explains a fit beside its weights. */
export function diagnose(fit: FinishedFit, training: TrainingFit): FitDiagnostics {
  const { context, part, plan } = fit;
  const { evidence } = plan;
  const positions = comparablePositions(part, context.design, context.read);
  const labels = positions.map((at) => {
    const column = context.design.columns[part.problem.kept[at]];
    const input = context.specification.inputs[column.input].column;
    return column.label === undefined ? { input } : { input, level: column.label };
  });
  return {
    residualSd: Math.sqrt(training.variance),
    trainingR2: training.r2,
    evidence:
      evidence === null
        ? null
        : {
            logEvidence: evidence.logEvidence,
            residualVariance: evidence.residualVariance,
            priorVariance: evidence.priorVariance,
          },
    ...collinearity(part, context.design, positions, labels),
    sharedLoad: sharedLoad(fit),
    ...residualDiagnostics(fit, training),
    selectionFrequency: selectionFrequency(fit),
    learningCurve: learningCurve(fit),
  };
}
