import type { Estimate, Inputs, PublishedEstimator } from '../api/contract';
import { asSentence, intervalInWords } from '../format/interval-words';
import { formatStepped, withUnit } from '../format/number-format';
import { Precision, precisionFor } from '../format/precision';
import { dayText, readingText } from './field-words';
import { FormField } from './form-field';

/** An estimate together with what it was asked for, so that the two are never shown apart. */
export interface AnsweredCase {
  readonly estimator: PublishedEstimator;
  readonly fields: readonly FormField[];
  readonly inputs: Inputs;
  readonly estimate: Estimate;
}

export function precisionOf({ value, interval }: Estimate): Precision {
  return precisionFor({ value, low: interval.low, high: interval.high });
}

export function valueText(estimate: Estimate, locale?: string): string {
  return formatStepped(estimate.value, precisionOf(estimate).step, locale);
}

export function intervalSentence(estimate: Estimate, locale?: string): string {
  const precision = precisionOf(estimate);
  return asSentence(intervalInWords(estimate.interval, { unit: estimate.unit, precision, locale }));
}

export function referenceLine({ edition, id, issuedAt }: Estimate, locale?: string): string {
  return `Edition ${edition}, reference ${id}, ${dayText(issuedAt.slice(0, 10), locale)}`;
}

export function caseTexts({ fields, inputs }: AnsweredCase, locale?: string): Record<string, string> {
  return Object.fromEntries(fields.map((field) => [field.name, readingText(field, inputs[field.name], locale)]));
}

/** The whole answer as plain text, for the clipboard. */
export function plainText(answered: AnsweredCase, locale?: string): string {
  const { estimator, fields, estimate } = answered;
  const texts = caseTexts(answered, locale);
  return [
    `${estimator.name}: ${withUnit(valueText(estimate, locale), estimate.unit)}`,
    intervalSentence(estimate, locale),
    ...estimate.flags.map(({ message }) => `Mind: ${message}`),
    '',
    ...fields.map(({ name, label }) => `${label}: ${texts[name]}`),
    '',
    ...estimate.cautions,
    referenceLine(estimate, locale),
  ]
    .join('\n')
    .replace(/[\u00a0\u202f]/g, ' ');
}
