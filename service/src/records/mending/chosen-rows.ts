import type { RecordTable } from '../../regression/records';
import { bindCondition } from './formula-evaluation';
import { Refusal } from './step-change';

export interface RowChoice {
  readonly where?: string;
  /** Counted from 1 in the table as it stands before the step. */
  readonly rows?: readonly number[];
}

/** The rows that a step is about: 1 where it applies. Both a condition and numbers must hold when both are given. */
export function chosenRows(table: RecordTable, { where, rows }: RowChoice): Uint8Array {
  const beyond = rows?.find((row) => row > table.rowCount);
  if (beyond !== undefined)
    throw new Refusal(`There is no row ${beyond} at this step; the table has ${table.rowCount}.`);
  const listed = rows && new Set(rows);
  const holds = where === undefined ? () => true : bindCondition(where, table);
  const chosen = new Uint8Array(table.rowCount);
  for (let row = 0; row < chosen.length; row++) if ((!listed || listed.has(row + 1)) && holds(row)) chosen[row] = 1;
  return chosen;
}

export function requireChoice(step: RowChoice): void {
  if (step.where === undefined && step.rows === undefined)
    throw new Refusal('Say which rows, by “where” or by “rows”.');
}

export const countOf = (chosen: Uint8Array): number => chosen.reduce((total, one) => total + one, 0);

export const choiceText = ({ where, rows }: RowChoice): string =>
  where === undefined ? (rows ? ' (listed by number)' : '') : ` where ${where}`;
