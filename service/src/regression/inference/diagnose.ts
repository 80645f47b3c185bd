import type { FinishedFit } from '../fit-result';
import type { FitDiagnostics } from '../result';
import type { TrainingFit } from './training-fit';
import { residualDiagnostics } from './residual-diagnostics';

export async function diagnose(fit: FinishedFit, training: TrainingFit): Promise<FitDiagnostics> {
  const { evidence } = fit.plan;
  return {
    residualSd: Math.sqrt(training.variance),
    trainingR2: training.r2,
    evidence:
      evidence === null
        ? null
        : { logEvidence: evidence.logEvidence, residualVariance: evidence.residualVariance, priorVariance: evidence.priorVariance },
    varianceInflation: [],
    conditionIndices: [],
    sharedLoad: [],
    ...residualDiagnostics(fit, training),
    selectionFrequency: null,
    learningCurve: null,
  };
}
