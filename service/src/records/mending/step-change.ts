import type { components } from '../../../../openapi/types/desk';
import type { CategoryRecordColumn, NumericRecordColumn, RecordColumn, RecordTable } from '../../regression/records';
import { kindWords } from '../kind-words';

export type MendStep = components['schemas']['MendStep'];
export type StepOf<Kind extends MendStep['kind']> = Extract<MendStep, { kind: Kind }>;

/** What a step does. */
export interface Effect {
  /** In a sentence. */
  readonly told: string;
  /** Null for a step that concerns whole columns. */
  readonly rowsConcerned: number | null;
}

/** A table after a step. */
export interface Change extends Effect {
  readonly table: RecordTable;
}

/** Why a step cannot be done on the table as it stands before it. */
export class Refusal extends Error {}

export function columnOf(table: RecordTable, name: string): RecordColumn {
  const found = table.columns.find((column) => column.name === name);
  if (!found) throw new Refusal(`There is no column ${name} at this step.`);
  return found;
}

export function numericOf(table: RecordTable, name: string): NumericRecordColumn {
  const column = columnOf(table, name);
  if (column.kind !== 'numeric')
    throw new Refusal(`${name} is a column of kind ${kindWords[column.kind]}; this step takes one of kind Number.`);
  return column;
}

export function categoryOf(table: RecordTable, name: string): CategoryRecordColumn {
  const column = columnOf(table, name);
  if (column.kind !== 'category')
    throw new Refusal(`${name} is a column of kind ${kindWords[column.kind]}; this step takes one of kind Category.`);
  return column;
}

/** The name without the blanks around it, when no other column has it. */
export function requireNewName(table: RecordTable, name: string): string {
  const trimmed = name.trim();
  if (trimmed === '') throw new Refusal('Give the column a name.');
  if (table.columns.some((column) => column.name === trimmed))
    throw new Refusal(`A column is called ${trimmed} already.`);
  return trimmed;
}

export const replaceColumn = (table: RecordTable, name: string, column: RecordColumn): RecordTable => ({
  ...table,
  columns: table.columns.map((old) => (old.name === name ? column : old)),
});
