import type { ErrorObject } from 'ajv/dist/2020';
import type { PointedError } from '../errors';
import type { InputSchema } from './input-schema';

type Property = Readonly<Record<string, unknown>>;
const mostNamed = 20;

/** RFC 6901, as a URI fragment. */
export function inputPointer(name: string): string {
  return `#/inputs/${encodeURIComponent(name.replaceAll('~', '~0').replaceAll('/', '~1'))}`;
}

/** What is wrong with a case, one entry an input, in words that say what to give. */
export function inputProblems(errors: readonly ErrorObject[], schema: InputSchema): PointedError[] {
  const properties = (schema['properties'] ?? {}) as Readonly<Record<string, Property>>;
  const problems = new Map<string, PointedError>();
  for (const error of errors) {
    const name = inputOf(error);
    if (name === null || problems.has(name)) continue;
    problems.set(name, { pointer: inputPointer(name), detail: adviceFor(error, name, properties) });
  }
  return [...problems.values()];
}

function inputOf(error: ErrorObject): string | null {
  if (error.keyword === 'required') return String(error.params['missingProperty']);
  if (error.keyword === 'additionalProperties') return String(error.params['additionalProperty']);
  const [, name] = error.instancePath.split('/');
  return name === undefined ? null : name.replaceAll('~1', '/').replaceAll('~0', '~');
}

function adviceFor(error: ErrorObject, name: string, properties: Readonly<Record<string, Property>>): string {
  if (error.keyword === 'additionalProperties')
    return `There is no input of this name. The inputs are ${listed(Object.keys(properties))}.`;
  const property = properties[name] ?? {};
  const advice = `Give ${wanted(property)}.`;
  return error.keyword === 'required' ? `${String(property['title'] ?? name)} is missing. ${advice}` : advice;
}

function wanted(property: Property): string {
  const unit = typeof property['x-unit'] === 'string' && property['x-unit'] !== '' ? ` in ${property['x-unit']}` : '';
  const orNull =
    Array.isArray(property['type']) && property['type'].includes('null') ? ', or null when it is not known' : '';
  if (Array.isArray(property['enum']))
    return `one of ${listed(property['enum'].filter((level) => level !== null).map(String))}${orNull}`;
  if (property['format'] === 'date') return `a day such as 2026-03-31${orNull}`;
  if (property['anyOf']) return `a text of 1 to 200 characters${orNull}`;
  const least = property['exclusiveMinimum'] === 0 ? ' above 0' : property['minimum'] === 0 ? ' of 0 or more' : '';
  return `a number${least}${unit}${orNull}`;
}

function listed(names: readonly string[]): string {
  const more = names.length - mostNamed;
  return more > 0 ? `${names.slice(0, mostNamed).join(', ')} and ${more} more` : names.join(', ');
}
