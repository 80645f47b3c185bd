/** One column of past cases. Shapes: every array has `rowCount` entries. */
export interface NumericRecordColumn {
  readonly name: string;
  readonly kind: 'numeric';
  readonly unit?: string;
  /** NaN marks a missing reading. */
  readonly values: Float64Array;
}

export interface CategoryRecordColumn {
  readonly name: string;
  readonly kind: 'category';
  /** Position in `levels`; −1 marks a missing reading. */
  readonly codes: Int32Array;
  readonly levels: readonly string[];
}

export interface DateRecordColumn {
  readonly name: string;
  readonly kind: 'date';
  /** Days since 1970-01-01; NaN marks a missing reading. */
  readonly values: Float64Array;
}

export interface TextRecordColumn {
  readonly name: string;
  readonly kind: 'text';
  readonly values: readonly (string | null)[];
}

export type RecordColumn = NumericRecordColumn | CategoryRecordColumn | DateRecordColumn | TextRecordColumn;

export interface RecordTable {
  readonly rowCount: number;
  readonly columns: readonly RecordColumn[];
}
