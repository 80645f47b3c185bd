/** What a fit is asked to do. Plain JSON; the contract's `specification` with the engine's few additions marked. */

export type FitMethod = 'least-squares' | 'ridge' | 'lasso' | 'elastic-net';
export type InputTransform = 'none' | 'log' | 'square-root' | 'spline';
export type TargetTransform = 'none' | 'log';
export type MissingRule = 'refuse' | 'typical';
export type SignLimit = 'any' | 'not-negative' | 'not-positive';
export type InputKind = 'numeric' | 'category' | 'date';
export type PenaltyRule =
  'minimum' | 'one-standard-error' | 'evidence' | 'prior' | 'leave-one-out' | 'generalised' | 'fixed';
export type ValidationScheme = 'k-fold' | 'grouped' | 'forward';
/** What to do with a category's level that the records never held. */
export type UnseenLevelRule = 'refuse' | 'other';

export interface TargetSpecification {
  readonly column: string;
  readonly transform: TargetTransform;
}

export interface InputSpecification {
  readonly column: string;
  /** Default: the column's own kind. A numeric column may be read as a category, never the other way round. */
  readonly kind?: InputKind;
  /** Default none. */
  readonly transform?: InputTransform;
  /** Default refuse. */
  readonly missing?: MissingRule;
  /** Multiplies λ for this input; 0 leaves it free. Default 1. */
  readonly penaltyFactor?: number;
  /** Limit on the sign of the weight; numeric and date inputs without spline only. Default any. */
  readonly sign?: SignLimit;
  /** Engine addition: number of knots of a spline, 3 to 7. Default 4. */
  readonly knots?: number;
  /** Engine addition. Default refuse. */
  readonly unseenLevel?: UnseenLevelRule;
}

export interface PenaltySpecification {
  readonly rule: PenaltyRule;
  /** λ of the stated objective for `fixed`; the prior standard deviation γ, in target units, for `prior`. */
  readonly value?: number;
}

export interface ValidationSpecification {
  readonly scheme: ValidationScheme;
  /** Default 10. */
  readonly folds?: number;
  /** Group column for `grouped`, time column for `forward`. */
  readonly column?: string;
  /** Default 1. */
  readonly seed?: number;
  /** Engine addition, `forward` only: width left out between training and held-out rows, in the time column's unit. Default 0. */
  readonly gap?: number;
}

/** Keeps the rows whose column equals one of the values (categories, text) or lies in the closed range (numbers, days). */
export interface RowFilter {
  readonly column: string;
  readonly equals?: readonly (string | number)[];
  readonly from?: number;
  readonly to?: number;
}

/** Longer computations that are made only when asked for. */
export interface ExtraSpecification {
  /** Honest held-out error of the whole procedure, penalty choice included. */
  readonly nestedFolds?: boolean;
  /** Lasso and elastic net: how often each input is chosen over this many seeded half samples. */
  readonly selectionSamples?: number;
  /** Held-out error against the number of training records. */
  readonly learningCurve?: boolean;
}

export interface FitSpecification {
  readonly target: TargetSpecification;
  readonly inputs: readonly InputSpecification[];
  readonly weightColumn?: string;
  readonly rowFilter?: RowFilter;
  readonly method: FitMethod;
  /** α of the objective, strictly between 0 and 1; elastic net only. Default 0.5. */
  readonly mixing?: number;
  /** Needed by every method but least squares. */
  readonly penalty?: PenaltySpecification;
  /** Default k-fold, 10 folds, seed 1. */
  readonly validation?: ValidationSpecification;
  /** Strictly between 0 and 1. Default 0.9. */
  readonly intervalLevel?: number;
  /** Engine addition: false fits through the origin (inputs are then scaled but not centred). Default true. */
  readonly intercept?: boolean;
  /** Engine addition. */
  readonly extras?: ExtraSpecification;
}
