import type { components } from '../../../../openapi/types/desk';
import type { MendStep } from '../mending/step-change';

export type FindingKind = components['schemas']['Finding']['kind'];

/** Something that a person should look at before a model hides it. */
export interface Finding {
  readonly kind: FindingKind;
  readonly columns: readonly string[];
  /** What was found, in a sentence. */
  readonly message: string;
  /** What may be done about it. */
  readonly remedy: string;
  /** How many rows it concerns; null when it concerns columns as a whole. */
  readonly rowCount: number | null;
  /** The first of these rows, counted from 1 below the header. */
  readonly rows: readonly number[];
  /** A condition that these rows meet and no others, where there is one. */
  readonly where?: string;
  /** The remedy as mending steps; none when a person has to judge. */
  readonly steps?: readonly MendStep[];
}

/** Rows that a finding lists. */
export const listedRows = 100;

/** From positions in the table, counted from 0. */
export const listRows = (positions: readonly number[]): Pick<Finding, 'rowCount' | 'rows'> => ({
  rowCount: positions.length,
  rows: positions.slice(0, listedRows).map((position) => position + 1),
});

/** Rows that one mending step may list. */
const rowsOfStep = 100_000;

/** A step for the rows at these positions: by number, or by condition where they are too many to list; else none. */
export function stepForRows(
  positions: readonly number[],
  where: string | undefined,
  step: (choice: { rows: number[] } | { where: string }) => MendStep,
): readonly MendStep[] {
  if (positions.length <= rowsOfStep) return [step({ rows: positions.map((position) => position + 1) })];
  return where === undefined ? [] : [step({ where })];
}

export const noRows: Pick<Finding, 'rowCount' | 'rows'> = { rowCount: null, rows: [] };

export const rowsText = (count: number): string => (count === 1 ? '1 row' : `${count.toLocaleString('en-GB')} rows`);
