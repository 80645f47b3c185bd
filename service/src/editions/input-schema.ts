import type { Formula, FormulaInput } from '../regression/formula/formula';

/** What the analyst wrote about an input for the form. */
export interface InputWords {
  readonly column: string;
  readonly label?: string;
  readonly help?: string;
}

export type InputSchema = Readonly<Record<string, unknown>>;

const longestLevel = 200;
const dayMs = 86_400_000;

/**
 * The inputs of a formula as JSON Schema 2020-12, with our own keywords: `x-unit`, `x-range` (recorded least and greatest;
 * days as ISO 8601), `x-typical`, `x-help`, `x-order` (from 1). An input whose gaps may be filled is not required and may be null.
 */
export function inputSchemaOf(formula: Formula, words: readonly InputWords[]): InputSchema {
  const wordsOf = new Map(words.map((entry) => [entry.column, entry]));
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    type: 'object',
    properties: Object.fromEntries(
      formula.inputs.map((input, at) => [input.name, propertyOf(input, at + 1, wordsOf.get(input.name))]),
    ),
    required: formula.inputs.filter((input) => input.missing === 'refuse').map((input) => input.name),
    additionalProperties: false,
  };
}

function propertyOf(input: FormulaInput, order: number, words: InputWords | undefined): InputSchema {
  return {
    ...valueRule(input),
    title: words?.label || input.name,
    ...(input.unit !== null && { 'x-unit': input.unit }),
    ...(input.range !== null && { 'x-range': [shown(input, input.range.min), shown(input, input.range.max)] }),
    'x-typical': typeof input.typical === 'number' ? shown(input, input.typical) : input.typical,
    ...(words?.help && { 'x-help': words.help }),
    'x-order': order,
  };
}

function valueRule(input: FormulaInput): InputSchema {
  const mayBeMissing = input.missing !== 'refuse';
  const type = (name: string): InputSchema => ({ type: mayBeMissing ? [name, 'null'] : name });
  if (input.kind === 'date') return { ...type('string'), format: 'date' };
  if (input.kind === 'category') return levelRule(input, mayBeMissing);
  if (input.transform === 'log') return { ...type('number'), exclusiveMinimum: 0 };
  return input.transform === 'square-root' ? { ...type('number'), minimum: 0 } : type('number');
}

function levelRule(input: FormulaInput, mayBeMissing: boolean): InputSchema {
  const levels = (input.levels ?? []).map(({ level }) => level);
  const known = { type: mayBeMissing ? ['string', 'null'] : 'string', enum: mayBeMissing ? [...levels, null] : levels };
  if (input.unseenLevel === 'refuse') return known;
  return { anyOf: [known, { type: 'string', minLength: 1, maxLength: longestLevel }] };
}

const shown = (input: FormulaInput, value: number): number | string =>
  input.kind === 'date' ? new Date(Math.floor(value) * dayMs).toISOString().slice(0, 10) : value;
