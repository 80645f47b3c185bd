import type { InputCoding } from '../formula/formula';
import type { SignLimit } from '../specification';

/** One column of the design. */
export interface DesignColumn {
  /** Position of its input in the specification. */
  readonly input: number;
  /** Level, "basis 2", or "missing"; undefined for a plain numeric column. */
  readonly label?: string;
  readonly penaltyFactor: number;
  readonly sign: SignLimit;
  readonly leftOut?: 'constant' | 'reference-level';
}

/** A column whose missing readings were filled with the mean of the others, and the column that marks them. */
export interface FilledColumn {
  readonly column: number;
  readonly indicator: number;
}

/**
 * The records as prepared columns. `data` is column-major, rowCount × (columnCount + 2): the columns of
 * √w·(x − centre)/scale, then √w, then √w·(y − targetCentre). Centres and scales are those of all records, so that sums of
 * products are of order one; folds re-standardise from their own moments. A column with scale 0 is all 0.
 */
export interface DesignMatrix {
  readonly rowCount: number;
  readonly columnCount: number;
  readonly columns: readonly DesignColumn[];
  readonly data: Float64Array;
  readonly centres: Float64Array;
  readonly scales: Float64Array;
  readonly targetCentre: number;
  readonly filled: readonly FilledColumn[];
  readonly codings: readonly InputCoding[];
  readonly intercept: boolean;
}

/** Columns of `data`: the design's own, √w, and the target. */
export function storedColumns(design: { readonly columnCount: number }): number {
  return design.columnCount + 2;
}
