import type { Inputs } from '../api/contract';
import { formatReading, withUnit } from '../format/number-format';
import { readNumber } from '../format/number-reading';
import { unitInWords } from '../format/unit-words';
import { DateField, FormField, NumberField } from './form-field';

/** What stands in the fields, by the input's name, exactly as typed. */
export type TypedTexts = Readonly<Partial<Record<string, string>>>;
export type FieldErrors = Readonly<Record<string, string>>;

export type CaseReading =
  { readonly ok: true; readonly inputs: Inputs } | { readonly ok: false; readonly errors: FieldErrors };

export type FieldReading =
  | { readonly ok: true; readonly value: string | number | boolean | null }
  | { readonly ok: false; readonly error: string };

export function readCase(fields: readonly FormField[], typed: TypedTexts, locale?: string): CaseReading {
  const inputs: Inputs = {};
  const errors: Record<string, string> = {};
  for (const field of fields) {
    const reading = readField(field, typed[field.name] ?? '', locale);
    if (!reading.ok) {
      errors[field.name] = reading.error;
    } else if (reading.value !== null || field.blank === 'null') {
      inputs[field.name] = reading.value;
    }
  }
  return Object.keys(errors).length > 0 ? { ok: false, errors } : { ok: true, inputs };
}

export function readField(field: FormField, typed: string, locale?: string): FieldReading {
  if (typed.trim() === '') {
    return field.blank === 'refused' ? { ok: false, error: askFor(field) } : { ok: true, value: null };
  }
  switch (field.kind) {
    case 'number':
      return readNumberField(field, typed, locale);
    case 'choice': {
      const chosen = field.options.find(({ value }) => String(value) === typed);
      return chosen ? { ok: true, value: chosen.value } : { ok: false, error: askFor(field) };
    }
    case 'date':
      return readDay(field, typed);
    case 'text':
      return { ok: true, value: typed.trim() };
  }
}

function readNumberField(field: NumberField, typed: string, locale?: string): FieldReading {
  const { label, unit, example } = field;
  const reading = readNumber(typed, { unit, locale });
  if (reading.ok) {
    const error = boundError(field, reading.value, locale);
    return error ? { ok: false, error } : { ok: true, value: reading.value };
  }
  switch (reading.reason) {
    case 'empty':
      return { ok: false, error: askFor(field) };
    case 'not-a-number':
      return {
        ok: false,
        error: `${label}: “${typed.trim()}” is not a number. Write it like ${formatReading(example, locale)}.`,
      };
    case 'other-unit':
      return {
        ok: false,
        error: unit
          ? `${label}: give it in ${unitInWords(unit)}, not in “${reading.typedUnit}”.`
          : `${label}: give the number alone, without “${reading.typedUnit}”.`,
      };
    case 'ambiguous':
      return {
        ok: false,
        error: `${label}: “${typed.trim()}” can be read in two ways. Write ${reading.asWhole} or ${reading.asDecimal}.`,
      };
  }
}

function boundError(
  { label, unit, whole, least, greatest }: NumberField,
  value: number,
  locale?: string,
): string | null {
  const figure = (bound: number): string => withUnit(formatReading(bound, locale), unit);
  if (whole && !Number.isInteger(value)) {
    return `${label}: give a whole number.`;
  }
  if (least && (least.inclusive ? value < least.value : value <= least.value)) {
    return `${label}: it must be ${least.inclusive ? `${figure(least.value)} or more` : `more than ${figure(least.value)}`}.`;
  }
  if (greatest && (greatest.inclusive ? value > greatest.value : value >= greatest.value)) {
    return `${label}: it must be ${greatest.inclusive ? `${figure(greatest.value)} or less` : `less than ${figure(greatest.value)}`}.`;
  }
  return null;
}

function readDay({ label }: DateField, typed: string): FieldReading {
  const day = typed.trim();
  const date = new Date(`${day}T00:00:00Z`);
  const isDay = /^\d{4}-\d{2}-\d{2}$/.test(day) && !Number.isNaN(date.getTime()) && date.toISOString().startsWith(day);
  return isDay ? { ok: true, value: day } : { ok: false, error: `${label}: give a day that exists, like 2026-03-31.` };
}

function askFor(field: FormField): string {
  switch (field.kind) {
    case 'number':
      return `${field.label}: enter a number${field.unit ? ` in ${unitInWords(field.unit)}` : ''}.`;
    case 'choice':
      return `${field.label}: choose one.`;
    case 'date':
      return `${field.label}: enter a date.`;
    case 'text':
      return `${field.label}: enter something here.`;
  }
}
