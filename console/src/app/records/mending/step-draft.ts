import type { ColumnKind, DateOrder, MendStep } from '../../api/contract';
import type { StepKind } from './step-words';
import type { TrialColumn } from './trials';
import { factorText } from './unit-conversions';

/** A step as it is being filled in: what stands in the fields, whether it can be read or not. */
export interface StepDraft {
  readonly kind: StepKind;
  readonly column: string;
  /** The new name of a column, or of a derived one. */
  readonly name: string;
  readonly unit: string;
  readonly toKind: ColumnKind;
  readonly dateOrder: DateOrder;
  readonly factor: string;
  readonly byCondition: boolean;
  readonly where: string;
  readonly byNumber: boolean;
  readonly rows: string;
  /** Levels that are mapped already, and to what. */
  readonly levels: Readonly<Record<string, string>>;
  /** Levels that are ticked to be mapped to the target. */
  readonly ticked: readonly string[];
  readonly target: string;
  readonly fewerThan: string;
  readonly into: string;
  readonly formula: string;
}

export function emptyDraft(kind: StepKind): StepDraft {
  return {
    ...{ kind, column: '', name: '', unit: '', toKind: 'numeric', dateOrder: 'year-first', factor: '' },
    // Dropping and emptying make no sense for every row, so a condition is asked for at once.
    ...{ byCondition: kind === 'set-missing' || kind === 'drop-rows', where: '', byNumber: false, rows: '' },
    ...{ levels: {}, ticked: [], target: '', fewerThan: '10', into: 'other', formula: '' },
  };
}

/** The fields of a step that stands in the list, to change it; `columns` as they stand before it. */
export function draftOf(step: MendStep, columns: readonly TrialColumn[]): StepDraft {
  const draft = { ...emptyDraft(step.kind), ...fieldsOf(step) };
  // A conversion that leaves the unit alone shows the unit that it leaves.
  if (step.kind === 'convert-unit' && step.unit === undefined) return { ...draft, unit: unitOf(columns, step.column) };
  return draft;
}

/** Another column has other levels and another unit, so what was entered of them goes. */
export function withColumn(draft: StepDraft, column: string, columns: readonly TrialColumn[]): StepDraft {
  return { ...draft, column, unit: unitOf(columns, column), levels: {}, ticked: [] };
}

function unitOf(columns: readonly TrialColumn[], name: string): string {
  return columns.find((column) => column.name === name)?.unit ?? '';
}

function fieldsOf(step: MendStep): Partial<StepDraft> {
  switch (step.kind) {
    case 'rename':
      return { column: step.column, name: step.to };
    case 'set-aside':
      return { column: step.column };
    case 'set-unit':
      return { column: step.column, unit: step.unit ?? '' };
    case 'set-kind':
      return { column: step.column, toKind: step.to, dateOrder: step.dateOrder ?? 'year-first' };
    case 'convert-unit':
      return { column: step.column, factor: factorInFull(step.factor), unit: step.unit ?? '', ...choiceOf(step) };
    case 'map-levels':
      return { column: step.column, levels: step.levels };
    case 'set-missing':
      return { column: step.column, ...choiceOf(step) };
    case 'drop-rows':
      return choiceOf(step);
    case 'drop-repeated-rows':
      return {};
    case 'join-rare-levels':
      return { column: step.column, fewerThan: String(step.fewerThan), into: step.into };
    case 'derive':
      return { name: step.name, formula: step.formula, unit: step.unit ?? '' };
  }
}

/** A short text where it stands for the very same number, else every digit. */
export function factorInFull(factor: number): string {
  const text = factorText(factor);
  return Number(text) === factor ? text : String(factor);
}

function choiceOf({ where, rows }: { readonly where?: string; readonly rows?: readonly number[] }): Partial<StepDraft> {
  return {
    ...{ byCondition: where !== undefined, where: where ?? '' },
    ...{ byNumber: rows !== undefined, rows: rows?.join(', ') ?? '' },
  };
}
