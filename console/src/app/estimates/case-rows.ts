import { formatReading, withUnit } from '@widget/format/number-format';
import type { EstimateRecord, InputSchema, Inputs } from '../api/contract';

/** One input of the case, as it is to be read. */
export interface CaseRow {
  readonly input: string;
  readonly label: string;
  readonly text: string;
  readonly flags: readonly string[];
}

interface InputWords {
  readonly label?: string;
  readonly unit?: string;
  readonly order: number;
}

/** The inputs in the edition's order, then any that its schema does not name. */
export function caseRows(record: EstimateRecord, schema: InputSchema | undefined): readonly CaseRow[] {
  const words = inputWords(schema);
  const labels = new Map(record.contributions.map(({ input, label }) => [input, label]));
  const flagsOf = (input: string) => record.flags.filter((flag) => flag.input === input).map(({ message }) => message);
  const names = [...new Set([...Object.keys(record.inputs), ...labels.keys()])];
  return names
    .sort((a, b) => orderOf(words, a) - orderOf(words, b))
    .map((input) => ({
      input,
      label: labels.get(input) ?? words.get(input)?.label ?? input,
      text: valueText(record.inputs[input], words.get(input)?.unit),
      flags: flagsOf(input),
    }));
}

function orderOf(words: ReadonlyMap<string, InputWords>, input: string): number {
  return words.get(input)?.order ?? Number.MAX_SAFE_INTEGER;
}

function valueText(value: Inputs[string] | undefined, unit: string | undefined): string {
  if (value === undefined || value === null || value === '') return 'not given';
  if (typeof value === 'number') return withUnit(formatReading(value, 'en-GB'), unit);
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return value;
}

function inputWords(schema: InputSchema | undefined): ReadonlyMap<string, InputWords> {
  const properties = Object.entries(recordOf(schema?.['properties']));
  return new Map(properties.map(([name, input], place) => [name, wordsOf(recordOf(input), place)]));
}

function wordsOf(input: Record<string, unknown>, place: number): InputWords {
  const order = input['x-order'];
  return {
    label: textOf(input['title']),
    unit: textOf(input['x-unit']),
    order: typeof order === 'number' ? order : place,
  };
}

function textOf(value: unknown): string | undefined {
  return typeof value === 'string' && value !== '' ? value : undefined;
}

function recordOf(value: unknown): Record<string, unknown> {
  return typeof value === 'object' && value !== null ? (value as Record<string, unknown>) : {};
}
