import { formatReading, withUnit } from '@widget/format/number-format';
import { precisionFor, roundTo } from '@widget/format/precision';
import type { Inputs } from '../../api/contract';
import { formatDay } from '../../ui/moment';
import { typedNumber } from '../words/typed-number';
import type { CaseField } from './case-fields';

/** What is typed into a case's form, by the field's name. */
export type CaseDraft = Readonly<Record<string, string>>;

export type CaseReading = { readonly inputs: Inputs } | { readonly problems: Readonly<Record<string, string>> };

/** The typical case of the records, as a place to start from. */
export function typicalDraft(fields: readonly CaseField[]): CaseDraft {
  return Object.fromEntries(fields.map((field) => [field.name, typicalText(field)]));
}

/** The typical reading, as finely as the recorded range deserves: 11.2 m, and a whole number where whole ones were recorded. */
export function typicalText({ typical, range }: CaseField): string {
  if (typical === null || typeof typical === 'string') return typical ?? '';
  return String(
    roundTo(typical, range ? stepWithin(range) : precisionFor({ value: typical, low: null, high: null }).step),
  );
}

function stepWithin({ least, greatest }: NonNullable<CaseField['range']>): number {
  if (Number.isInteger(least) && Number.isInteger(greatest)) return 1;
  // Two digits that count of a fifth of the half range: finer than anyone measures, coarser than the mean's many digits.
  return precisionFor({ value: 0, low: least / 5, high: greatest / 5 }).step;
}

/** Reads the form; an optional field left empty is sent as missing. */
export function readCase(fields: readonly CaseField[], draft: CaseDraft): CaseReading {
  const problems: Record<string, string> = {};
  const inputs: Record<string, Inputs[string]> = {};
  for (const field of fields) {
    const text = (draft[field.name] ?? '').trim();
    const reading = readField(field, text);
    if ('problem' in reading) problems[field.name] = reading.problem;
    else inputs[field.name] = reading.value;
  }
  return Object.keys(problems).length > 0 ? { problems } : { inputs };
}

function readField(
  field: CaseField,
  text: string,
): { readonly value: string | number | null } | { readonly problem: string } {
  if (text === '') return field.required ? { problem: missingWords(field) } : { value: null };
  if (field.kind !== 'number') return { value: text };
  const reading = typedNumber(text, field.unit);
  return 'empty' in reading ? { value: null } : reading;
}

function missingWords({ kind, label }: CaseField): string {
  return kind === 'choice' ? `Choose ${label.toLowerCase()}.` : `Enter ${label.toLowerCase()}.`;
}

/** The readings as they stand beside the beam: `9.8 t`, `GRP`. */
export function caseTexts(fields: readonly CaseField[], inputs: Inputs): Readonly<Record<string, string>> {
  return Object.fromEntries(fields.map((field) => [field.name, readingText(field, inputs[field.name] ?? null)]));
}

function readingText({ unit }: CaseField, value: Inputs[string]): string {
  if (value === null) return 'not given';
  return typeof value === 'number' ? withUnit(formatReading(value, 'en-GB'), unit) : String(value);
}

/** What the records cover, under the field. */
export function fieldHint(field: CaseField): string | undefined {
  return [field.help, coveredWords(field)].filter(Boolean).join(' ') || undefined;
}

function coveredWords({ range, days, unit }: CaseField): string {
  if (range)
    return `Recorded ${formatReading(range.least, 'en-GB')} to ${withUnit(formatReading(range.greatest, 'en-GB'), unit)}.`;
  return days ? `Recorded ${formatDay(days.first)} to ${formatDay(days.last)}.` : '';
}
