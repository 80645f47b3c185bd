import type { DesignColumn } from '../design/design-matrix';
import type { SignLimit } from '../specification';

/** Penalty factor and sign limit of each kept column. */
export interface ColumnPenalties {
  readonly factors: Float64Array;
  readonly signs: readonly SignLimit[];
}

export function penaltiesOf(columns: readonly DesignColumn[], kept: Int32Array): ColumnPenalties {
  return {
    factors: Float64Array.from(kept, (column) => columns[column].penaltyFactor),
    signs: Array.from(kept, (column) => columns[column].sign),
  };
}

export function hasSignLimits(penalties: ColumnPenalties): boolean {
  return penalties.signs.some((sign) => sign !== 'any');
}

/** Positions of the columns that are neither penalised nor limited: they are projected out, like the intercept. */
export function freePositions(penalties: ColumnPenalties): number[] {
  return positions(penalties, (index) => penalties.factors[index] === 0 && penalties.signs[index] === 'any');
}

export function heldPositions(penalties: ColumnPenalties): number[] {
  return positions(penalties, (index) => penalties.factors[index] !== 0 || penalties.signs[index] !== 'any');
}

function positions(penalties: ColumnPenalties, accept: (index: number) => boolean): number[] {
  return penalties.signs.map((_, index) => index).filter(accept);
}
