import type { InputSchema, Inputs } from '../api/contract';

/** The typical case of an edition, read from its input schema: a case that is sure to be answered. */
export function typicalInputs(schema: InputSchema): Inputs {
  const properties = recordOf(schema['properties']);
  const typical = Object.entries(properties).map(([name, input]) => [name, recordOf(input)['x-typical']] as const);
  return Object.fromEntries(typical.filter((pair): pair is [string, Inputs[string]] => isInputValue(pair[1])));
}

function recordOf(value: unknown): Record<string, unknown> {
  return typeof value === 'object' && value !== null ? (value as Record<string, unknown>) : {};
}

function isInputValue(value: unknown): value is Inputs[string] {
  return ['number', 'string', 'boolean'].includes(typeof value);
}
