import type { Method, RecordColumn, RecordRevision, SpecificationInput } from '../../api/contract';
import type { InputTransform, PenaltyRule, ValidationScheme } from '../desk-types';

/** One row of the inputs' table. Texts are as typed; they are read when the fit is started. */
export interface InputDraft {
  readonly column: string;
  readonly used: boolean;
  readonly kind: 'own' | 'numeric' | 'category';
  readonly transform: InputTransform;
  readonly missing: NonNullable<SpecificationInput['missing']>;
  readonly unseen: NonNullable<SpecificationInput['unseen']>;
  readonly sign: NonNullable<SpecificationInput['sign']>;
  readonly penaltyFactor: string;
  readonly label: string;
  readonly help: string;
}

/** Everything chosen and typed on the page. */
export interface FitDraft {
  readonly recordSetId: string;
  readonly revisionId: string;
  /** Empty: every record is used. */
  readonly filterColumn: string;
  readonly filterLevels: readonly string[];
  readonly filterFrom: string;
  readonly filterTo: string;
  readonly target: string;
  readonly targetTransform: 'none' | 'log';
  readonly inputs: readonly InputDraft[];
  readonly method: Method;
  readonly mixing: string;
  readonly rule: PenaltyRule;
  readonly penaltyValue: string;
  readonly scheme: ValidationScheme;
  readonly folds: string;
  readonly seed: string;
  readonly groupColumn: string;
  readonly timeColumn: string;
  readonly gap: string;
  readonly level: string;
  readonly weightColumn: string;
  readonly nestedFolds: boolean;
  readonly selectionFrequency: boolean;
  readonly learningCurve: boolean;
}

/** A category with more levels than this is left out at first: names and remarks are no measurement. */
const mostLevels = 40;

export const emptyDraft: FitDraft = {
  recordSetId: '',
  revisionId: '',
  filterColumn: '',
  filterLevels: [],
  filterFrom: '',
  filterTo: '',
  target: '',
  targetTransform: 'none',
  inputs: [],
  method: 'ridge',
  mixing: '0.5',
  rule: 'minimum',
  penaltyValue: '',
  scheme: 'k-fold',
  folds: '10',
  seed: '1',
  groupColumn: '',
  timeColumn: '',
  gap: '0',
  level: '90',
  weightColumn: '',
  nestedFolds: false,
  selectionFrequency: false,
  learningCurve: false,
};

/** Columns that can be an input at all. */
export function possibleInputs(revision: RecordRevision): readonly RecordColumn[] {
  return revision.columns.filter((column) => column.kind !== 'text');
}

export function numericColumns(revision: RecordRevision): readonly RecordColumn[] {
  return revision.columns.filter((column) => column.kind === 'numeric');
}

/** Columns that can keep records together: groups are named or numbered. */
export function groupColumns(revision: RecordRevision): readonly RecordColumn[] {
  return revision.columns.filter((column) => column.kind === 'category' || column.kind === 'numeric');
}

export function timeColumns(revision: RecordRevision): readonly RecordColumn[] {
  return revision.columns.filter((column) => column.kind === 'date' || column.kind === 'numeric');
}

/** Takes up another revision. Choices whose columns it also has are kept; the rest fall back to what suits it. */
export function draftOn(revision: RecordRevision, before: FitDraft): FitDraft {
  const has = (columns: readonly RecordColumn[], name: string): string =>
    columns.some((column) => column.name === name) ? name : '';
  return {
    ...before,
    recordSetId: revision.recordSetId,
    revisionId: revision.id,
    filterColumn: has(revision.columns, before.filterColumn),
    target: has(numericColumns(revision), before.target),
    groupColumn: has(groupColumns(revision), before.groupColumn) || firstOf(revision, 'category'),
    timeColumn: has(timeColumns(revision), before.timeColumn) || firstOf(revision, 'date'),
    weightColumn: has(numericColumns(revision), before.weightColumn),
    inputs: possibleInputs(revision).map(
      (column) => before.inputs.find((input) => input.column === column.name) ?? inputDraftOf(column),
    ),
  };
}

function inputDraftOf(column: RecordColumn): InputDraft {
  return {
    column: column.name,
    used: isLikelyInput(column),
    kind: 'own',
    transform: 'none',
    missing: column.missingCount > 0 ? 'typical' : 'refuse',
    unseen: 'refuse',
    sign: 'any',
    penaltyFactor: '1',
    label: '',
    help: '',
  };
}

/** A column with one value, a category with very many levels, and a date say nothing until somebody decides. */
function isLikelyInput(column: RecordColumn): boolean {
  const different = column.distinctCount ?? Infinity;
  if (different < 2) return false;
  return column.kind === 'numeric' || (column.kind === 'category' && different <= mostLevels);
}

function firstOf(revision: RecordRevision, kind: RecordColumn['kind']): string {
  return revision.columns.find((column) => column.kind === kind)?.name ?? '';
}

/** Inputs that will be sent: those ticked that are not already target or weight. */
export function usedInputs(draft: FitDraft): readonly InputDraft[] {
  return draft.inputs.filter((input) => input.used && !isTaken(draft, input.column));
}

/** Whether a column already serves as target or weight, so that it cannot be an input as well. */
export function isTaken(draft: FitDraft, column: string): boolean {
  return column === draft.target || column === draft.weightColumn;
}

/** The same change to several inputs. */
export interface InputsChange {
  readonly columns: readonly string[];
  readonly change: Partial<InputDraft>;
}

export function withInputs(draft: FitDraft, { columns, change }: InputsChange): FitDraft {
  const touched = new Set(columns);
  return {
    ...draft,
    inputs: draft.inputs.map((input) => (touched.has(input.column) ? { ...input, ...change } : input)),
  };
}

/** The longer computations that the chosen method and rule have a use for. */
export function extrasOffered({ method, rule }: FitDraft): { nestedFolds: boolean; selectionFrequency: boolean } {
  return {
    nestedFolds: method !== 'least-squares' && (rule === 'minimum' || rule === 'one-standard-error'),
    selectionFrequency: method === 'lasso' || method === 'elastic-net',
  };
}
