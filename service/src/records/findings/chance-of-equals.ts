import type { RecordColumn, RecordTable } from '../../regression/records';

function lengthsOfRuns(sorted: Float64Array): number[] {
  const lengths: number[] = [];
  let start = 0;
  for (let at = 1; at <= sorted.length; at++) {
    if (at < sorted.length && Object.is(sorted[at], sorted[start])) continue;
    lengths.push(at - start);
    start = at;
  }
  return lengths;
}

function countsOf(column: RecordColumn): Iterable<number> {
  if (column.kind === 'numeric' || column.kind === 'date') return lengthsOfRuns(column.values.slice().sort());
  const counts = new Map<number | string | null, number>();
  const cells: Iterable<number | string | null> = column.kind === 'category' ? column.codes : column.values;
  for (const cell of cells) counts.set(cell, (counts.get(cell) ?? 0) + 1);
  return counts.values();
}

/** Chance that two rows drawn at random agree in a column: Σ (n of a value / n)². Missing counts as a value. */
function chanceOfAgreeing(column: RecordColumn, rowCount: number): number {
  let chance = 0;
  for (const count of countsOf(column)) chance += (count / rowCount) ** 2;
  return chance;
}

/**
 * How many pairs of rows would agree in all of some columns by chance, if the columns had nothing to do with each
 * other: ½ n (n − 1) Π chance. In a table of few levels equal rows are to be expected and say nothing. Cost: one
 * sort of each column, when first asked.
 */
export class ChanceOfEquals {
  private chances: number[] | undefined;

  constructor(private readonly table: RecordTable) {}

  /** All columns, or all but the one at a position. */
  expectedPairs(leftOut?: number): number {
    const { rowCount, columns } = this.table;
    this.chances ??= columns.map((column) => chanceOfAgreeing(column, rowCount));
    const together = this.chances.filter((_, position) => position !== leftOut).reduce((a, b) => a * b, 1);
    return (rowCount * (rowCount - 1) * together) / 2;
  }
}
