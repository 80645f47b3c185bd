import type { RevisionCells } from './revision-cells';
import { PairSums } from './pair-sums';

/** Columns beyond these are left out: the work grows with their square. */
export const mappedColumns = 100;

export interface CorrelationMap {
  readonly columns: readonly string[];
  readonly correlations: readonly (readonly (number | null)[])[];
  /** Rows where both are present. */
  readonly counts: readonly (readonly number[])[];
}

/** Gives the order of the columns from how far apart they are; positions from 0. */
export type Ordering = (distances: readonly (readonly number[])[]) => readonly number[];

/**
 * Pearson's correlations of every two of the columns over the rows where both are present, in the order that
 * `ordering` gives on 1 − |correlation| (1 where there is none). Cost: rows × columns² / 2, with one block of every
 * column in memory.
 */
export function correlationMap(cells: RevisionCells, names: readonly string[], ordering: Ordering): CorrelationMap {
  const columns = names.map((name) => cells.column(name));
  const sums = columns.map((_, row) => Array.from({ length: row + 1 }, () => new PairSums()));
  cells.blockRowCounts.forEach((_, block) => {
    const values = columns.map((column) => cells.numbers(column, block));
    sums.forEach((line, row) => line.forEach((pair, column) => pair.addBlock(values[row], values[column])));
  });
  const pairOf = (a: number, b: number): PairSums => sums[Math.max(a, b)][Math.min(a, b)];
  const every = columns.map((_, position) => position);
  const distance = (a: number, b: number): number => (a === b ? 0 : 1 - Math.abs(pairOf(a, b).correlation ?? 0));
  const order = ordering(every.map((a) => every.map((b) => distance(a, b))));
  // Rounding may leave a column's correlation with itself just short of 1.
  const shown = (a: number, b: number): number | null =>
    a === b && pairOf(a, a).correlation !== null ? 1 : pairOf(a, b).correlation;
  return {
    columns: order.map((position) => names[position]),
    correlations: order.map((a) => order.map((b) => shown(a, b))),
    counts: order.map((a) => order.map((b) => pairOf(a, b).count)),
  };
}
