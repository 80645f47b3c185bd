import { cellsToCodes, cellsToNumbers, type ColumnKind } from '../cell-blocks';
import { formOf, type CellForm } from './cell-form';
import { CodeStore, type CellStore } from './cell-stores';
import { newCellStore } from './column-builder';
import { ColumnEvidence, newCellReaders } from './column-evidence';
import type { ColumnPlan } from './column-plan';
import { dateText } from './date-cell';
import { areLevels } from './finished-column';
import { shownRows } from './looked-rows';
import type { DecimalMark } from './number-cell';

type Rows = readonly (readonly string[])[];
export type ReadCell = number | string | null;

/** A column's first rows, read as the whole file would be with the same plan. */
export interface LookedColumn {
  readonly plan: ColumnPlan;
  readonly evidence: ColumnEvidence;
  readonly form: CellForm;
  readonly kind: ColumnKind;
  /** Days since 1970-01-01 of a date column. */
  readonly values: readonly ReadCell[];
  /** Neither missing nor fitting. */
  readonly unreadableCount: number;
  /** The shown ones of them, counted from 1. */
  readonly unreadableRows: readonly number[];
}

export function gatherEvidence(plan: ColumnPlan, rows: Rows): ColumnEvidence {
  const evidence = new ColumnEvidence(plan);
  const readers = newCellReaders();
  for (const row of rows) evidence.addText(row[plan.position], readers);
  return evidence;
}

/** Row by row as far as rows are shown, so that each one that does not fit is known. */
function fill(store: CellStore, rows: Rows, position: number): number[] {
  const unreadable: number[] = [];
  const shown = Math.min(shownRows, rows.length);
  for (let row = 0; row < shown; row++) {
    const before = store.unreadableCount;
    store.add([rows[row]], { position, start: row });
    if (store.unreadableCount > before) unreadable.push(row + 1);
  }
  store.add(rows.slice(shown), { position, start: shown });
  return unreadable;
}

function valuesOf(store: CellStore, rowCount: number): ReadCell[] {
  const cells = store.takeBlock(rowCount);
  if (store instanceof CodeStore)
    return Array.from(cellsToCodes(cells), (code) => (code < 0 ? null : store.levels[code]));
  return Array.from(cellsToNumbers(cells), (value) => (Number.isNaN(value) ? null : value));
}

function kindOf(form: CellForm, plan: ColumnPlan, values: readonly ReadCell[]): ColumnKind {
  if (form.kind === 'numeric' || form.kind === 'date') return form.kind;
  if (form.kind === 'nothing' || plan.kind === 'text') return 'text';
  const present = values.filter((value): value is string => typeof value === 'string');
  return areLevels([...new Set(present)], present.length, plan) ? 'category' : 'text';
}

export function lookAtColumn(evidence: ColumnEvidence, rows: Rows, fileMark: DecimalMark): LookedColumn {
  const { plan } = evidence;
  const form = formOf(evidence, fileMark);
  // Evidence of its own, so that units are not counted twice.
  const store = newCellStore(form, new ColumnEvidence(plan), newCellReaders(), rows.length);
  const unreadableRows = store ? fill(store, rows, plan.position) : [];
  const values = store ? valuesOf(store, rows.length) : rows.map(() => null);
  const unreadableCount = store?.unreadableCount ?? 0;
  return { plan, evidence, form, kind: kindOf(form, plan, values), values, unreadableCount, unreadableRows };
}

export const shownCell = ({ form, values }: LookedColumn, row: number): ReadCell => {
  const value = values[row];
  return form.kind === 'date' && typeof value === 'number' ? dateText(value) : value;
};
