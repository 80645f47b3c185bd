import type { NumericRecordColumn, RecordTable } from '../../regression/records';

/** Columns beyond this are not compared: the work grows with their square. */
const comparedColumns = 200;
/** Cells that comparing every two columns may take; past it only every n-th row is looked at. */
const comparedCells = 1e9;

export interface ComparedColumns {
  readonly columns: readonly NumericRecordColumn[];
  /** Said in the finding when not every row was looked at; else empty. */
  readonly caution: string;
}

function varies({ values }: NumericRecordColumn): boolean {
  let first = NaN;
  for (const value of values) {
    if (first !== first) first = value;
    else if (value === value && value !== first) return true;
  }
  return false;
}

/** The numeric columns that vary, with fewer rows where comparing every two of them would take too long. */
export function comparedColumnsOf(table: RecordTable): ComparedColumns {
  const columns = table.columns
    .filter((column) => column.kind === 'numeric')
    .filter(varies)
    .slice(0, comparedColumns);
  const step = Math.ceil((table.rowCount * columns.length ** 2) / 2 / comparedCells);
  if (step <= 1) return { columns, caution: '' };
  const length = Math.floor((table.rowCount - 1) / step) + 1;
  const thin = (values: Float64Array): Float64Array => Float64Array.from({ length }, (_, at) => values[at * step]);
  return {
    columns: columns.map((column) => ({ ...column, values: thin(column.values) })),
    caution: ` Reckoned from one row in ${step}, since there are many.`,
  };
}
