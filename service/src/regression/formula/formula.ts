import type { InputKind, InputTransform, MissingRule, TargetTransform, UnseenLevelRule } from '../specification';

/**
 * A finished fit as frozen data: plain JSON, no NaN or infinity anywhere, everything that is needed to evaluate a case
 * and to describe the inputs. The model is additive on one scale (the target's own, or its logarithm):
 *
 *   additive value = typical + Σ over inputs of contribution,   contribution = Σ over its columns of weight · (x − centre) / scale
 *
 * Every column is centred on the records, so contributions have weighted mean 0 over them and the typical case gets 0.
 */
export interface Formula {
  readonly format: 'tarebeam-formula/1';
  readonly target: FormulaTarget;
  /** Value of the typical case on the additive scale: the beam's pivot. */
  readonly typicalAdditive: number;
  /** The typical case's value as shown: in target units, smeared when the target was logged. */
  readonly typical: number;
  readonly inputs: readonly FormulaInput[];
  readonly interval: FormulaInterval;
  readonly leverage: FormulaLeverage | null;
  readonly records: FormulaRecords;
}

export interface FormulaTarget {
  readonly name: string;
  readonly unit: string | null;
  readonly transform: TargetTransform;
  /** Duan (1983): weighted mean of exp(residual); 1 when the target is not logged. */
  readonly smearing: number;
  /** The value that is shown estimates the mean; for a logged target the median (value ÷ smearing) is given beside it. */
  readonly shown: 'mean';
  readonly recordedRange: RecordedRange;
}

export interface RecordedRange {
  readonly min: number;
  readonly max: number;
}

export interface FormulaLevel {
  readonly level: string;
  /** Records that had it. */
  readonly count: number;
}

export interface FormulaInput {
  readonly name: string;
  readonly kind: InputKind;
  readonly unit: string | null;
  readonly transform: InputTransform;
  readonly missing: MissingRule;
  readonly unseenLevel: UnseenLevelRule;
  /** Numbers and days, in the column's own unit before any transform; null for a category. */
  readonly range: RecordedRange | null;
  /** The 0, 10, … 100 % points of the readings (of an even selection of 20,000 of them on larger tables), for comparing what is asked with what was recorded; null for a category. */
  readonly deciles: readonly number[] | null;
  /** Levels in the order of the records; null for numbers and days. */
  readonly levels: readonly FormulaLevel[] | null;
  /** Records in which the reading was missing. */
  readonly missingCount: number;
  /** Mean reading (back from the transformed scale), or the commonest level. */
  readonly typical: number | string;
  /** Weighted standard deviation of the contribution over the records. */
  readonly mass: number;
  /** A float lifts: a plain numeric input whose weight is negative. */
  readonly hangs: 'load' | 'float';
  readonly coding: InputCoding;
  /** Standardised weight of each column of `coding`; contribution = Σ weight · column. */
  readonly weights: readonly number[];
}

/**
 * How a reading becomes standardised columns (x − centre) / scale; a scale of 0 marks a column that is left out (always 0).
 * linear: the transformed reading. spline: the columns of the natural cubic spline on `knots`. levels: a 0/1 column for each
 * level, all 0 for a level the records never held. With `missingIndicator` a last 0/1 column marks a missing reading.
 */
export interface InputCoding {
  readonly form: 'linear' | 'spline' | 'levels';
  readonly transform: 'none' | 'log' | 'square-root';
  readonly knots: readonly number[];
  readonly centres: readonly number[];
  readonly scales: readonly number[];
  readonly missingIndicator: boolean;
}

/** One model fitted without one fold, with the held-out residuals of that fold. */
export interface FoldModel {
  readonly typicalAdditive: number;
  /** Weights of the columns of all inputs, in order. */
  readonly weights: readonly number[];
  /** For each input its own coding where it differs from the formula's (the knots of a spline), else null; null when none does. */
  readonly codings: readonly (InputCoding | null)[] | null;
  /**
   * Absolute held-out residuals on the additive scale, ascending, with the number of records that each stands for.
   * Long lists are thinned upward: every record is stood for by a residual at least as large, so intervals only widen.
   */
  readonly residuals: readonly number[];
  readonly counts: readonly number[];
}

/** CV+ (Barber, Candès, Ramdas and Tibshirani 2021, "Predictive inference with the jackknife+", section 3). */
export interface FormulaInterval {
  readonly level: number;
  readonly rule: 'cv-plus' | 'gaussian';
  readonly folds: readonly FoldModel[];
  /** Gaussian interval: residual standard deviation on the additive scale and the quantile that multiplies it; null for lasso. */
  readonly gaussian: { readonly residualSd: number; readonly quantile: number } | null;
}

/**
 * h(x) = constant + x̃ᵀ M x̃ with x̃ the standardised columns that are kept, in order. M is symmetric; its lower
 * triangle is packed by rows. A case with h above `largest` (the largest among the records) is jointly unusual.
 */
export interface FormulaLeverage {
  /** Positions among the standardised columns of all inputs, in order. */
  readonly columns: readonly number[];
  readonly constant: number;
  readonly packed: readonly number[];
  readonly largest: number;
}

export interface FormulaRecords {
  readonly count: number;
  readonly weightSum: number;
}
