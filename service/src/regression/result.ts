import type { SignLimit } from './specification';

/** What a fit found: plain JSON, the contract's `result`. Nothing in it is NaN or infinite; null stands where no figure exists. */
export interface FitResult {
  readonly penalty: FitPenalty;
  /** In original (additive-scale) units, at the zero of every input's transformed reading. */
  readonly intercept: number;
  readonly interceptStandardError: number | null;
  readonly weights: readonly FitWeight[];
  readonly accuracy: FitAccuracy;
  readonly path: readonly PathPoint[];
  readonly report: FitReport;
  readonly diagnostics: FitDiagnostics;
}

export interface FitPenalty {
  readonly lambda: number;
  /** λ·n: the textbook's "sum of squares + λ‖w‖²" on standardised inputs. */
  readonly lambdaSum: number;
  /** γ = √(σ²/(nλ)), ridge only; null when λ is 0 (a flat prior) or the penalty is not a square. */
  readonly priorSd: number | null;
  /** Without the intercept. */
  readonly effectiveDegreesOfFreedom: number;
  /** What each rule would have chosen, where it applies. */
  readonly choices: readonly PenaltyChoice[];
}

export interface PenaltyChoice {
  readonly rule: 'minimum' | 'one-standard-error' | 'leave-one-out' | 'generalised' | 'evidence' | 'prior' | 'fixed';
  readonly lambda: number;
}

export interface FitWeight {
  readonly input: string;
  /** Category level, spline basis column ("basis 2"), or "missing" for the indicator of a missing reading. */
  readonly level?: string;
  /** Original units (of the transformed reading). */
  readonly value: number;
  readonly standardised: number;
  /** In the units of `value`; only where theory gives one (least squares; ridge: posterior). */
  readonly standardError?: number;
  readonly centre: number;
  readonly scale: number;
  readonly penaltyFactor: number;
  readonly sign: SignLimit;
  /** Why a weight is 0 without being estimated. */
  readonly leftOut?: 'constant' | 'reference-level' | 'dependent';
}

/** From held-out folds, in target units unless it says otherwise. */
export interface FitAccuracy {
  readonly rmse: number;
  readonly mae: number;
  readonly r2: number;
  /** cvStandardError of the chosen point of the path (units of cvError). */
  readonly standardErrorOfCv: number;
  /** The same as a standard error of rmse on the additive scale: standardErrorOfCv / (2·√cvError). */
  readonly rmseStandardError: number;
  /** Held-out coverage of the default interval, 0 to 1. */
  readonly coverage: number;
  readonly coverageGaussian: number | null;
  /** By quarter of the estimate's range, lowest first. */
  readonly coverageByQuarter: readonly QuarterCoverage[];
  /** In-sample root mean squared residual on the additive scale, for comparison only. */
  readonly trainingRmse: number;
  /** Held-out rmse (additive scale) of the whole procedure, penalty choice included; when asked for. */
  readonly nestedRmse?: number;
}

export interface QuarterCoverage {
  readonly from: number;
  readonly to: number;
  readonly records: number;
  readonly coverage: number;
  readonly coverageGaussian: number | null;
}

export interface PathPoint {
  readonly lambda: number;
  readonly effectiveDegreesOfFreedom: number;
  readonly cvError: number;
  readonly cvStandardError: number;
  /** In the order of `weights`. */
  readonly standardised: readonly number[];
}

export interface FitReport {
  readonly route: string;
  readonly iterations: number;
  readonly converged: boolean;
  /** Relative duality gap of the chosen fit; 0 for a direct solution. */
  readonly gap: number;
  /**
   * Of the standardised columns that are kept, the commonest level of each category aside: largest ÷ smallest singular
   * value; null when it is not finite.
   */
  readonly conditionNumber: number | null;
  readonly warnings: readonly string[];
  readonly recordCount: number;
  readonly columnCount: number;
  readonly foldCount: number;
}

export interface FitDiagnostics {
  /** Residual standard deviation on the additive scale: √(Σ w r² / (n − 1 − df)). */
  readonly residualSd: number;
  readonly trainingR2: number;
  /** Log marginal likelihood at the evidence's optimum, with the variances it estimates; ridge only. */
  readonly evidence: {
    readonly logEvidence: number;
    readonly residualVariance: number;
    readonly priorVariance: number;
  } | null;
  readonly varianceInflation: readonly {
    readonly input: string;
    readonly level?: string;
    readonly factor: number | null;
  }[];
  /** Belsley, Kuh and Welsch (1980), chapter 3: columns scaled to length 1, not centred, with the intercept; the 60 largest. */
  readonly conditionIndices: readonly ConditionIndex[];
  /** What the proportions of a condition index belong to, in order. */
  readonly conditionColumns: readonly { readonly input: string; readonly level?: string }[];
  readonly sharedLoad: readonly SharedLoadGroup[];
  readonly influential: readonly InfluentialRecord[];
  readonly residuals: readonly ResidualPoint[];
  readonly selectionFrequency:
    readonly { readonly input: string; readonly level?: string; readonly frequency: number }[] | null;
  readonly learningCurve: readonly { readonly records: number; readonly rmse: number }[] | null;
}

export interface ConditionIndex {
  readonly index: number | null;
  /** Share of each coefficient's variance, in the order of `conditionColumns`. */
  readonly proportions: readonly number[];
}

/** Inputs that carry the same information, and how each method splits the load among them (standardised weights). */
export interface SharedLoadGroup {
  readonly members: readonly { readonly input: string }[];
  readonly found: 'correlation' | 'near-null direction';
  /** Smallest |correlation| (for inputs of several columns, canonical) between two members. */
  readonly smallestCorrelation: number;
  /** Null when least squares has no single answer. */
  readonly leastSquares: readonly number[] | null;
  readonly ridge: readonly number[];
  readonly lasso: readonly number[];
}

export interface InfluentialRecord {
  /** Row in the record table as given, from 0. */
  readonly row: number;
  readonly cooksDistance: number;
  readonly leverage: number;
  readonly residual: number;
}

/** At most 2,000 evenly spaced records, for plots; additive scale unless named otherwise. */
export interface ResidualPoint {
  readonly row: number;
  /** In target units. */
  readonly recorded: number;
  /** In target units, from the fold that did not see the record. */
  readonly heldOutEstimate: number | null;
  readonly fitted: number;
  readonly residual: number;
  readonly leverage: number | null;
}
