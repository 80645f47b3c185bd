import { Draws } from './draws';
import { withDuplicates, withMarks, withOtherUnit, withSpellings, type TableRow } from './table';

export interface FaultCounts {
  readonly inFeet: number;
  readonly inKilograms: number;
  readonly spelledOtherwise: number;
  readonly duplicates: number;
}

/** What yards write where a draught was never taken. */
export const notTaken = 999;

const otherSpellings: Readonly<Record<string, string>> = { 'glass fibre': 'Glass fibre', steel: 'STEEL' };

/**
 * The same rows as they reach a desk: some lengths in feet, kilograms for tonnes, materials spelled otherwise, 999 for
 * a draught that nobody took, rows entered twice.
 */
export function asReceived(rows: readonly TableRow[], faults: FaultCounts): TableRow[] {
  const draws = new Draws(77);
  const feet = { column: 'length overall (m)', count: faults.inFeet, factor: 1 / 0.3048, digits: 1 };
  const kilograms = { column: 'displacement (t)', count: faults.inKilograms, factor: 1000, digits: 0 };
  const measured = withOtherUnit(withOtherUnit(rows, feet, draws), kilograms, draws);
  const spelling = { column: 'hull material', otherwise: otherSpellings, count: faults.spelledOtherwise };
  const spelled = withSpellings(measured, spelling, draws);
  return withDuplicates(withMarks(spelled, 'draught (m)', notTaken), faults.duplicates, draws);
}
