import { formatReading, withUnit } from '../format/number-format';
import { unitInWords } from '../format/unit-words';
import { DateField, FormField, NumberField } from './form-field';

/** What the records cover, under the field; null where it is not known. */
export function rangeHint(field: FormField, locale?: string): string | null {
  if (field.kind === 'number' && field.recorded) {
    return `The records run from ${numberRange(field, locale)}.`;
  }
  if (field.kind === 'date' && field.recorded) {
    return `The records run from ${dayRange(field, locale)}.`;
  }
  return null;
}

/** Plausible, but outside what the records cover: said beside the field, never an error. */
export function outsideNotice(field: FormField, value: unknown, locale?: string): string | null {
  if (field.kind === 'number' && field.recorded && typeof value === 'number') {
    const { least, greatest } = field.recorded;
    return value < least || value > greatest ? outside(readingText(field, value, locale)) : null;
  }
  if (field.kind === 'date' && field.recorded && typeof value === 'string') {
    const { least, greatest } = field.recorded;
    return value < least || value > greatest ? outside(readingText(field, value, locale)) : null;
  }
  return null;
}

/** An answer as it is shown beside the estimate. */
export function readingText(field: FormField, value: unknown, locale?: string): string {
  if (value === null || value === undefined) {
    return 'not given';
  }
  switch (field.kind) {
    case 'number':
      return typeof value === 'number' ? withUnit(formatReading(value, locale), field.unit) : String(value);
    case 'choice':
      return field.options.find((option) => option.value === value)?.text ?? String(value);
    case 'date':
      return dayText(String(value), locale);
    case 'text':
      return String(value);
  }
}

/** " (in metres)": read with the label, because a unit at the end of the field is not. */
export function unitForReaders(field: FormField): string {
  return field.kind === 'number' && field.unit ? ` (in ${unitInWords(field.unit)})` : '';
}

export function dayText(day: string, locale?: string): string {
  const date = new Date(`${day}T00:00:00Z`);
  return Number.isNaN(date.getTime())
    ? day
    : new Intl.DateTimeFormat(locale, { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(date);
}

function outside(reading: string): string {
  return `${reading} lies outside the records; the estimate will be marked.`;
}

function numberRange({ recorded, unit }: NumberField, locale?: string): string {
  return recorded
    ? `${formatReading(recorded.least, locale)} to ${withUnit(formatReading(recorded.greatest, locale), unit)}`
    : '';
}

function dayRange({ recorded }: DateField, locale?: string): string {
  return recorded ? `${dayText(recorded.least, locale)} to ${dayText(recorded.greatest, locale)}` : '';
}
