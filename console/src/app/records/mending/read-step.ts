import type { MendStep } from '../../api/contract';
import type { Complaints } from '../../ui/entry-form';
import type { StepDraft } from './step-draft';
import type { TrialColumn } from './trials';

export type StepField =
  | 'column'
  | 'name'
  | 'unit'
  | 'factor'
  | 'choice'
  | 'where'
  | 'rows'
  | 'levels'
  | 'target'
  | 'fewerThan'
  | 'into'
  | 'formula';

export type StepReading = { readonly step: MendStep } | { readonly complaints: Complaints<StepField> };

const LONGEST_NAME = 255;
const LONGEST_UNIT = 40;
const LONGEST_LEVEL = 200;
const LONGEST_FORMULA = 500;
const MOST_ROWS = 100_000;

/** Reads the fields as a step, or says what is wrong with them. What only the records can tell, the service says. */
export function readStep(draft: StepDraft, columns: readonly TrialColumn[]): StepReading {
  const complaints = complaintsOf(draft);
  if (Object.values(complaints).some((complaint) => complaint !== undefined)) return { complaints };
  return { step: stepOf(draft, columns) };
}

function complaintsOf(draft: StepDraft): Complaints<StepField> {
  switch (draft.kind) {
    case 'drop-repeated-rows':
      return {};
    case 'set-aside':
    case 'set-kind':
      return columnComplaint(draft);
    case 'rename':
      return { ...columnComplaint(draft), name: textComplaint(draft.name, 'the new name', LONGEST_NAME) };
    case 'set-unit':
      return { ...columnComplaint(draft), unit: unitComplaint(draft.unit) };
    case 'convert-unit':
      return { ...columnComplaint(draft), ...conversionComplaints(draft), ...rowComplaints(draft) };
    case 'map-levels':
      return { ...columnComplaint(draft), ...levelComplaints(draft) };
    case 'set-missing':
      return { ...columnComplaint(draft), ...requiredRowComplaints(draft) };
    case 'drop-rows':
      return requiredRowComplaints(draft);
    case 'join-rare-levels':
      return { ...columnComplaint(draft), ...joiningComplaints(draft) };
    case 'derive':
      return {
        name: textComplaint(draft.name, 'a name for the new column', LONGEST_NAME),
        formula: textComplaint(draft.formula, 'a formula', LONGEST_FORMULA),
        unit: unitComplaint(draft.unit),
      };
  }
}

function columnComplaint({ column }: StepDraft): Complaints<StepField> {
  return { column: column === '' ? 'Choose a column' : undefined };
}

function textComplaint(text: string, noun: string, longest: number): string | undefined {
  const { length } = text.trim();
  if (length === 0) return `Enter ${noun}`;
  return length > longest ? `Shorten it to ${longest} characters; it has ${length}` : undefined;
}

function unitComplaint(unit: string): string | undefined {
  return unit.trim().length > LONGEST_UNIT ? `Shorten the unit to ${LONGEST_UNIT} characters` : undefined;
}

function conversionComplaints({ factor, unit }: StepDraft): Complaints<StepField> {
  const value = numberOf(factor);
  const wrong = Number.isNaN(value) || value === 0;
  return { factor: wrong ? 'Enter the factor as a number, such as 0.3048' : undefined, unit: unitComplaint(unit) };
}

function joiningComplaints({ fewerThan, into }: StepDraft): Complaints<StepField> {
  return {
    fewerThan: /^\d{1,9}$/.test(fewerThan.trim()) && Number(fewerThan) >= 2 ? undefined : 'Enter a whole number from 2',
    into: textComplaint(into, 'the level that takes them', LONGEST_LEVEL),
  };
}

function levelComplaints({ levels, ticked, target }: StepDraft): Complaints<StepField> {
  if (ticked.length > 0) return { target: textComplaint(target, 'what they become', LONGEST_LEVEL) };
  return { levels: Object.keys(levels).length === 0 ? 'Tick the levels to map' : undefined };
}

function rowComplaints({ byCondition, where, byNumber, rows }: StepDraft): Complaints<StepField> {
  return {
    where: byCondition ? textComplaint(where, 'a condition', LONGEST_FORMULA) : undefined,
    rows: byNumber ? rowsComplaint(rows) : undefined,
  };
}

function requiredRowComplaints(draft: StepDraft): Complaints<StepField> {
  const unsaid = !draft.byCondition && !draft.byNumber;
  return { choice: unsaid ? 'Say which rows, by a condition or by number' : undefined, ...rowComplaints(draft) };
}

function rowsComplaint(text: string): string | undefined {
  const rows = rowsOf(text);
  if (rows.length === 0 || rows.some((row) => !Number.isSafeInteger(row) || row < 1))
    return 'Enter row numbers parted by commas, such as 3, 14, 25';
  return rows.length > MOST_ROWS ? 'Enter at most 100,000 row numbers' : undefined;
}

function rowsOf(text: string): number[] {
  const words = text.split(/[\s,;]+/).filter((word) => word !== '');
  return [...new Set(words.map((word) => (/^\d+$/.test(word) ? Number(word) : NaN)))].sort((a, b) => a - b);
}

/** A decimal comma is read too; two marks leave it open which is meant. */
function numberOf(text: string): number {
  const plain = text.trim().replace(/^−/, '-').replace(',', '.');
  return plain === '' ? NaN : Number(plain);
}

function stepOf(draft: StepDraft, columns: readonly TrialColumn[]): MendStep {
  const { column } = draft;
  switch (draft.kind) {
    case 'rename':
      return { kind: 'rename', column, to: draft.name.trim() };
    case 'set-aside':
      return { kind: 'set-aside', column };
    case 'set-unit':
      return { kind: 'set-unit', column, unit: unitOf(draft.unit) };
    case 'set-kind':
      return {
        kind: 'set-kind',
        column,
        to: draft.toKind,
        ...(draft.toKind === 'date' && { dateOrder: draft.dateOrder }),
      };
    case 'convert-unit':
      return {
        kind: 'convert-unit',
        column,
        factor: numberOf(draft.factor),
        ...unitChange(draft, columns),
        ...choice(draft),
      };
    case 'map-levels':
      return { kind: 'map-levels', column, levels: mappedLevels(draft) };
    case 'set-missing':
      return { kind: 'set-missing', column, ...choice(draft) };
    case 'drop-rows':
      return { kind: 'drop-rows', ...choice(draft) };
    case 'drop-repeated-rows':
      return { kind: 'drop-repeated-rows' };
    case 'join-rare-levels':
      return { kind: 'join-rare-levels', column, fewerThan: Number(draft.fewerThan), into: draft.into.trim() };
    case 'derive': {
      const unit = unitOf(draft.unit);
      return { kind: 'derive', name: draft.name.trim(), formula: draft.formula.trim(), ...(unit !== null && { unit }) };
    }
  }
}

function unitOf(text: string): string | null {
  return text.trim() === '' ? null : text.trim();
}

/** A unit that is as it was is left out, so that the step says only what it changes. */
function unitChange({ column, unit }: StepDraft, columns: readonly TrialColumn[]): { unit?: string | null } {
  const before = columns.find(({ name }) => name === column)?.unit ?? null;
  return unitOf(unit) === before ? {} : { unit: unitOf(unit) };
}

function choice({ byCondition, where, byNumber, rows }: StepDraft): { where?: string; rows?: number[] } {
  return { ...(byCondition && { where: where.trim() }), ...(byNumber && { rows: rowsOf(rows) }) };
}

/** What was mapped already and what is ticked now. */
export function mappedLevels({ levels, ticked, target }: StepDraft): Record<string, string> {
  return { ...levels, ...Object.fromEntries(ticked.map((level) => [level, target.trim()])) };
}
