import type { RidgeForm } from '../solvers/ridge-form';

/** Number of records less the intercept and the free columns, which have flat priors and are integrated out. */
export interface EvidenceSetting {
  readonly records: number;
  readonly flat: number;
}

export interface EvidenceAnswer {
  readonly lambda: number;
  readonly logEvidence: number;
  /** σ² */
  readonly residualVariance: number;
  /** γ² */
  readonly priorVariance: number;
}

/**
 * Log marginal likelihood of y given σ² and γ², weights ~ N(0, γ²/p), m = n − flat:
 *   −½ [ m log(2πσ²) + Σ log(1 + d_j/λ) + (RSS + nλ‖x‖²)/σ² ],  λ = σ²/(nγ²)
 * (Bishop 2006, section 3.5.1, eq. 3.86, with d the eigenvalues of A = X̃ᵀX̃/n.)
 */
export function logEvidence(
  form: RidgeForm,
  setting: EvidenceSetting,
  residualVariance: number,
  lambda: number,
): number {
  const degrees = setting.records - setting.flat;
  const { residualSquare, penaltySquare } = form.parts(lambda);
  const misfit = setting.records * (residualSquare + lambda * penaltySquare);
  const determinant = form.eigenvalues.reduce((sum, eigenvalue) => sum + Math.log1p(eigenvalue / lambda), 0);
  return -0.5 * (degrees * Math.log(2 * Math.PI * residualVariance) + determinant + misfit / residualVariance);
}

/** σ² that maximises the evidence at λ: (RSS + nλ‖x‖²)/m. */
function bestVariance(form: RidgeForm, setting: EvidenceSetting, lambda: number): number {
  const { residualSquare, penaltySquare } = form.parts(lambda);
  return (setting.records * (residualSquare + lambda * penaltySquare)) / (setting.records - setting.flat);
}

/** Both variances by maximum marginal likelihood: a grid over log λ, then golden section. */
export function maximiseEvidence(
  form: RidgeForm,
  setting: EvidenceSetting,
  range: { readonly strongest: number; readonly weakest: number },
): EvidenceAnswer {
  const at = (logLambda: number): number => {
    const lambda = Math.exp(logLambda);
    return logEvidence(form, setting, bestVariance(form, setting, lambda), lambda);
  };
  const lambda = sharpen(form, setting, Math.exp(maximise(at, Math.log(range.weakest), Math.log(range.strongest))));
  const residualVariance = bestVariance(form, setting, lambda);
  return {
    lambda,
    logEvidence: at(Math.log(lambda)),
    residualVariance,
    priorVariance: residualVariance / (setting.records * lambda),
  };
}

/**
 * The flat top of a likelihood fixes λ to about eight digits only; the condition for its maximum, γ̂·σ² = nλ‖x‖² with
 * γ̂ = Σ d/(d + λ) (MacKay 1992; Bishop 2006, eq. 3.92), fixes it fully. A few secant steps in log λ; the start is kept when
 * they do not settle (a maximum at the end of the range).
 */
function sharpen(form: RidgeForm, setting: EvidenceSetting, start: number): number {
  const excess = (logLambda: number): number => {
    const lambda = Math.exp(logLambda);
    const effective = form.eigenvalues.reduce((sum, eigenvalue) => sum + eigenvalue / (eigenvalue + lambda), 0);
    return (
      effective * bestVariance(form, setting, lambda) - setting.records * lambda * form.parts(lambda).penaltySquare
    );
  };
  let before = Math.log(start);
  let now = before + 1e-4;
  let valueBefore = excess(before);
  for (let round = 0; round < 30; round += 1) {
    const value = excess(now);
    if (value === 0 || value === valueBefore) break;
    const next = now - (value * (now - before)) / (value - valueBefore);
    [before, valueBefore, now] = [now, value, next];
    if (Math.abs(now - before) < 1e-15 * Math.abs(now)) break;
  }
  return Math.abs(now - Math.log(start)) < 1e-3 ? Math.exp(now) : start;
}

/** σ² by maximum marginal likelihood when the prior's standard deviation is given; λ = σ²/(nγ²). */
export function evidenceForPrior(form: RidgeForm, setting: EvidenceSetting, priorSd: number): EvidenceAnswer {
  const priorVariance = priorSd * priorSd;
  const lambdaOf = (logVariance: number): number => Math.exp(logVariance) / (setting.records * priorVariance);
  const at = (logVariance: number): number => logEvidence(form, setting, Math.exp(logVariance), lambdaOf(logVariance));
  const middle = Math.log(form.targetSquare);
  const logVariance = maximise(at, middle - 45, middle + 5);
  return {
    lambda: lambdaOf(logVariance),
    logEvidence: at(logVariance),
    residualVariance: Math.exp(logVariance),
    priorVariance,
  };
}

const GRID = 200;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Best of a grid, then golden section between its neighbours. */
function maximise(objective: (place: number) => number, from: number, to: number): number {
  const step = (to - from) / GRID;
  const values = Array.from({ length: GRID + 1 }, (_, index) => objective(from + index * step));
  const best = values.reduce((place, value, index) => (value > values[place] ? index : place), 0);
  let low = from + Math.max(0, best - 1) * step;
  let high = from + Math.min(GRID, best + 1) * step;
  let inner = high - GOLDEN * (high - low);
  let outer = low + GOLDEN * (high - low);
  for (let round = 0; round < 80; round += 1) {
    if (objective(inner) >= objective(outer)) high = outer;
    else low = inner;
    inner = high - GOLDEN * (high - low);
    outer = low + GOLDEN * (high - low);
  }
  return (low + high) / 2;
}
