/** One field of a case's form, read from an edition's input schema (JSON Schema 2020-12 with our `x-` keywords). */
export interface CaseField {
  readonly name: string;
  readonly label: string;
  readonly kind: 'number' | 'choice' | 'date';
  readonly unit: string;
  readonly help: string;
  /** Recorded least and greatest. */
  readonly range: { readonly least: number; readonly greatest: number } | null;
  /** First and last recorded day. */
  readonly days: { readonly first: string; readonly last: string } | null;
  readonly levels: readonly string[];
  /** Levels that the records never held may be given too. */
  readonly otherLevels: boolean;
  readonly typical: string | number | null;
  readonly required: boolean;
  readonly order: number;
}

type Plain = Readonly<Record<string, unknown>>;

/** Fields in the form's order. Anything that the schema does not say is left empty, never guessed. */
export function caseFields(schema: Plain): readonly CaseField[] {
  const properties = asPlain(schema['properties']);
  const required = new Set(asList(schema['required']));
  return Object.keys(properties)
    .map((name, position) => fieldOf(name, asPlain(properties[name]), { required: required.has(name), position }))
    .sort((left, right) => left.order - right.order);
}

function fieldOf(
  name: string,
  property: Plain,
  place: { readonly required: boolean; readonly position: number },
): CaseField {
  return {
    name,
    label: textOf(property['title']) || name,
    kind: kindOf(property),
    unit: textOf(property['x-unit']),
    help: textOf(property['x-help']) || textOf(property['description']),
    range: rangeOf(property['x-range']),
    days: daysOf(property['x-range']),
    levels: levelsOf(property),
    otherLevels: alternatives(property).some(isAnyText),
    typical: typicalOf(property['x-typical']),
    required: place.required,
    order: typeof property['x-order'] === 'number' ? property['x-order'] : place.position,
  };
}

function kindOf(property: Plain): CaseField['kind'] {
  if (levelsOf(property).length > 0) return 'choice';
  const types = alternatives(property).flatMap((option) => asList(option['type']));
  if (types.includes('number') || types.includes('integer')) return 'number';
  return alternatives(property).some((option) => option['format'] === 'date') ? 'date' : 'choice';
}

/** A value that may also be null is written either as a list of types or with `oneOf` and `anyOf`. */
function alternatives(property: Plain): readonly Plain[] {
  const nested = [...asArray(property['oneOf']), ...asArray(property['anyOf'])];
  return [property, ...nested.map(asPlain)];
}

function levelsOf(property: Plain): readonly string[] {
  const levels = alternatives(property).flatMap((option) => asArray(option['enum']));
  return [...levels, ...asArray(property['x-levels'])].filter((level): level is string => typeof level === 'string');
}

function rangeOf(value: unknown): CaseField['range'] {
  const [least, greatest] = Array.isArray(value) ? value : [asPlain(value)['min'], asPlain(value)['max']];
  return typeof least === 'number' && typeof greatest === 'number' ? { least, greatest } : null;
}

function daysOf(value: unknown): CaseField['days'] {
  const [first, last] = asArray(value);
  return typeof first === 'string' && typeof last === 'string' ? { first, last } : null;
}

function isAnyText(option: Plain): boolean {
  return asList(option['type']).includes('string') && option['enum'] === undefined && option['format'] === undefined;
}

function typicalOf(value: unknown): CaseField['typical'] {
  return typeof value === 'number' || typeof value === 'string' ? value : null;
}

function textOf(value: unknown): string {
  return typeof value === 'string' ? value : '';
}

function asPlain(value: unknown): Plain {
  return typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Plain) : {};
}

function asArray(value: unknown): readonly unknown[] {
  return Array.isArray(value) ? value : [];
}

function asList(value: unknown): readonly string[] {
  if (typeof value === 'string') return [value];
  return asArray(value).filter((item): item is string => typeof item === 'string');
}
