import type { ColumnEvidence } from './column-evidence';
import type { ColumnPlan } from './column-plan';
import { DateForm } from './date-cell';
import type { DecimalMark } from './number-cell';
import type { DateOrder } from './reading-choices';
import { areConvertible, unitNamed, type Unit } from './units';

/** How a column's cells are kept: `words` become a category or text once all of them are known. */
export type CellForm =
  | { readonly kind: 'nothing' }
  /** `unit`: what cells with a unit are converted to; null while there are none. */
  | { readonly kind: 'numeric'; readonly mark: DecimalMark; readonly unit: Unit | null }
  /** `forms`: the ways of writing that are read, `dayFirst` and `monthFirst` never both. */
  | { readonly kind: 'date'; readonly forms: number }
  | { readonly kind: 'words' };

const isSingleForm = (forms: number): boolean => forms !== 0 && (forms & (forms - 1)) === 0;
const bothOrders = DateForm.dayFirst | DateForm.monthFirst;
const plainForms = DateForm.iso | DateForm.isoMonth | DateForm.named;

const formsOfOrder: Readonly<Record<DateOrder, number>> = {
  'year-first': plainForms,
  'day-first': plainForms | DateForm.dayFirst,
  'month-first': plainForms | DateForm.monthFirst,
};

/** The order in which dates of these forms name day, month and year. */
export function orderOfForms(forms: number): DateOrder {
  if (forms & DateForm.monthFirst) return 'month-first';
  return forms & DateForm.dayFirst || forms === DateForm.named ? 'day-first' : 'year-first';
}

/** The unit that stands most often in the cells; the first one seen, between equals. */
function mostFrequentUnit(units: ReadonlyMap<Unit, number>): Unit | null {
  let found: Unit | null = null;
  for (const [unit, count] of units) if (!found || count > (units.get(found) ?? 0)) found = unit;
  return found;
}

/** The unit to convert to: that of the plan, null when it is not known; without one the most frequent. */
export function targetUnitOf({ plan, units }: ColumnEvidence): Unit | null {
  if (units.size === 0) return null;
  return plan.unit === null ? mostFrequentUnit(units) : unitNamed(plan.unit);
}

/** A column's unit: the one that was chosen or that the header names, else that of the cells. */
export function columnUnitOf(plan: ColumnPlan, form: CellForm): string | null {
  if (form.kind !== 'numeric') return null;
  return plan.unitSettled ? plan.unit : (plan.unit ?? form.unit?.symbol ?? null);
}

const allConvert = ({ units }: ColumnEvidence, target: Unit | null): boolean =>
  [...units.keys()].every((unit) => target !== null && areConvertible(unit, target));

function numericFormOf(evidence: ColumnEvidence, fileMark: DecimalMark): CellForm | null {
  const forced = evidence.plan.kind === 'numeric';
  const marks = (['.', ','] as const).filter((mark) => evidence.allowsMark(mark));
  if (marks.length === 0 && !forced) return null;
  const unit = targetUnitOf(evidence);
  if (!forced && !allConvert(evidence, unit)) return null;
  return { kind: 'numeric', mark: marks.includes(fileMark) ? fileMark : (marks[0] ?? fileMark), unit };
}

/** A column that shall be a date keeps every date whose day and month are certain or stand in the column's order. */
function forcedDateOf({ plan, certainOrders }: ColumnEvidence): CellForm {
  const monthFirst = plan.dateOrder === null && certainOrders === DateForm.monthFirst;
  return { kind: 'date', forms: formsOfOrder[plan.dateOrder ?? (monthFirst ? 'month-first' : 'day-first')] };
}

/**
 * A date counts only when its order is certain over the whole column, or was chosen. `12/03/2026` alone could be
 * either; such a column stays words.
 */
export function formOf(evidence: ColumnEvidence, fileMark: DecimalMark): CellForm {
  const { plan, dateForms } = evidence;
  if (plan.kind === 'category' || plan.kind === 'text') return { kind: 'words' };
  if (plan.kind === 'date') return forcedDateOf(evidence);
  if (evidence.isEmpty && plan.kind === null) return { kind: 'nothing' };
  const numeric = numericFormOf(evidence, fileMark);
  if (numeric) return numeric;
  const chosen = plan.dateOrder === null ? dateForms : dateForms & formsOfOrder[plan.dateOrder];
  return isSingleForm(chosen) ? { kind: 'date', forms: chosen } : { kind: 'words' };
}

/** The form to begin with: as `formOf`, but an order of day and month that is open yet is taken to become clear. */
export function likelyFormOf(evidence: ColumnEvidence, fileMark: DecimalMark): CellForm {
  const form = formOf(evidence, fileMark);
  const open = form.kind === 'words' && evidence.plan.kind === null && evidence.dateForms === bothOrders;
  return open ? { kind: 'date', forms: DateForm.dayFirst } : form;
}

/**
 * The file's decimal mark, from the columns that leave no doubt. Without any: a comma where a column has `1,234` and
 * the cells are parted by something else than commas, for such files come from places that write so; else a point.
 */
export function fileMarkOf(columns: readonly ColumnEvidence[], delimiter: string): DecimalMark {
  const certain = (mark: DecimalMark, other: DecimalMark): number =>
    columns.filter((column) => column.allowsMark(mark) && !column.allowsMark(other)).length;
  const [points, commas] = [certain('.', ','), certain(',', '.')];
  if (points !== commas) return points > commas ? '.' : ',';
  const doubtful = columns.some((column) => column.allowsMark(',') && column.hasDoubtfulCommas);
  return delimiter !== ',' && delimiter !== '' && doubtful ? ',' : '.';
}

export function sameForm(kept: CellForm, decided: CellForm, evidence: ColumnEvidence): boolean {
  if (kept.kind === 'numeric' && decided.kind === 'numeric')
    return (kept.mark === decided.mark || !evidence.hasMarks) && kept.unit === decided.unit;
  if (kept.kind === 'date' && decided.kind === 'date') return kept.forms === decided.forms;
  return kept.kind === decided.kind;
}
