import type { ColumnKind } from '../cell-blocks';
import { unitOf } from './header';
import { MissingMarks, usualMarks } from './missing-marks';
import type { BaseColumn, ColumnChoice, DateOrder, ReadingChoices } from './reading-choices';
import { TableProblem } from './table-problem';

/** What is settled about a column before its cells are read. */
export interface ColumnPlan {
  readonly name: string;
  readonly position: number;
  /** Never stored. */
  readonly setAside: boolean;
  /** Null while the cells decide. */
  readonly kind: ColumnKind | null;
  /** The unit that was chosen, or the base revision's, or the header's; null for none. */
  readonly unit: string | null;
  /** Whether the unit was chosen, null included, so that cells do not add one. */
  readonly unitSettled: boolean;
  readonly dateOrder: DateOrder | null;
  readonly marks: MissingMarks;
}

const listed = (names: readonly string[]): string => {
  const shown = names.slice(0, 20).map((name) => `“${name.slice(0, 60)}”`);
  return names.length > 20 ? `${shown.join(', ')} and ${names.length - 20} more` : shown.join(', ');
};

const misfit = (detail: string): TableProblem => new TableProblem('choices-invalid', detail);

function requireNamed(names: readonly string[], choices: readonly ColumnChoice[]): void {
  const present = new Set(names);
  const unknown = choices.map((choice) => choice.name.trim()).filter((name) => !present.has(name));
  if (unknown.length === 0) return;
  throw misfit(
    `The file has no ${unknown.length === 1 ? 'column' : 'columns'} ${listed(unknown)}. Its columns are ${listed(names)}.`,
  );
}

/** Reading a file of which nothing would be stored is a mistake; looking at one is not. */
export function requireColumnsLeft(plans: readonly ColumnPlan[], base?: readonly BaseColumn[]): void {
  if (plans.some((plan) => !plan.setAside)) return;
  throw misfit(
    base
      ? 'The file has none of the revision’s columns. Choose another file, or bring it in by itself.'
      : 'Every column is set aside. Leave at least one.',
  );
}

/** Settles what the choices, and the columns of a base revision, say about the file's columns. */
export function planColumns(
  names: readonly string[],
  choices: ReadingChoices,
  base?: readonly BaseColumn[],
): readonly ColumnPlan[] {
  const columnChoices = choices.columns ?? [];
  requireNamed(names, columnChoices);
  const chosen = new Map(columnChoices.map((choice) => [choice.name.trim(), choice]));
  const bases = base && new Map(base.map((column) => [column.name, column]));
  return names.map((name, position): ColumnPlan => {
    const choice = chosen.get(name);
    const held = bases?.get(name);
    if (held && choice?.setAside)
      throw misfit(`The column ${listed([name])} belongs to the revision that is appended to. Do not set it aside.`);
    const settled = held ?? choice;
    const extra = [...(choices.missingMarks ?? []), ...(choice?.missingMarks ?? [])];
    return {
      name,
      position,
      setAside: bases ? !held : (choice?.setAside ?? false),
      kind: settled?.kind ?? null,
      unit: settled?.unit === undefined ? unitOf(name) : settled.unit,
      unitSettled: settled?.unit !== undefined,
      dateOrder: choice?.dateOrder ?? null,
      marks: extra.length > 0 ? new MissingMarks(extra) : usualMarks,
    };
  });
}
