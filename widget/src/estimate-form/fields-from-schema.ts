import type { InputSchema } from '../api/contract';
import { isObject } from '../api/read-answers';
import { Bound, ChoiceOption, FormField, NumberField, Range } from './form-field';

type Property = Readonly<Record<string, unknown>>;

/** Up to this many levels are shown at once, as radio buttons. */
const MOST_RADIOS = 3;
const MS_PER_DAY = 86_400_000;
/** Offered where the estimator also takes levels that its records never held; the desk then marks the estimate. */
const SOMETHING_ELSE: ChoiceOption = { text: 'Something else', value: 'something else' };

/** The form's fields in the estimator's own order. The schema comes over the network: what is not understood is left aside. */
export function fieldsFrom(schema: InputSchema): readonly FormField[] {
  const properties = isObject(schema['properties']) ? schema['properties'] : {};
  const required: readonly unknown[] = Array.isArray(schema['required']) ? schema['required'] : [];
  return Object.entries(properties)
    .filter((entry): entry is [string, Property] => isObject(entry[1]))
    .map(([name, property], index) => ({
      order: numberIn(property, 'x-order') ?? 1000 + index,
      field: fieldFrom(name, property, required.includes(name)),
    }))
    .sort((a, b) => a.order - b.order)
    .map(({ field }) => field);
}

function fieldFrom(name: string, property: Property, required: boolean): FormField {
  const types = alternativesOf(property).flatMap(typesOf);
  const nullable = types.includes('null') || levelsOf(property).includes(null);
  const base = {
    name,
    label: textIn(property, 'title') ?? name,
    help: textIn(property, 'x-help'),
    blank: nullable && required ? 'null' : required ? 'refused' : 'left-out',
  } as const;
  const options = optionsOf(property, types);
  if (options.length > 0) {
    return { ...base, kind: 'choice', options, shownAs: options.length <= MOST_RADIOS ? 'radios' : 'list' };
  }
  if (types.includes('number') || types.includes('integer')) {
    return { ...base, ...numberParts(property, types) };
  }
  if (property['format'] === 'date') {
    return { ...base, kind: 'date', recorded: dayRangeOf(property) };
  }
  return { ...base, kind: 'text', suggestions: listIn(property, 'examples').filter(isText) };
}

function numberParts(
  property: Property,
  types: readonly string[],
): Omit<NumberField, 'name' | 'label' | 'help' | 'blank'> {
  const recorded = numberRangeOf(property);
  const least = boundOf(property, 'minimum', 'exclusiveMinimum');
  const middle = recorded ? Number(((recorded.least + recorded.greatest) / 2).toPrecision(2)) : 30;
  return {
    kind: 'number',
    unit: textIn(property, 'x-unit'),
    whole: !types.includes('number'),
    mayBeNegative: (least?.value ?? recorded?.least ?? -1) < 0,
    least,
    greatest: boundOf(property, 'maximum', 'exclusiveMaximum'),
    recorded,
    example: exampleFrom(numberIn(property, 'x-typical') ?? middle),
  };
}

/** A plain figure, near the typical one: three digits, or a whole number for years and the like. */
function exampleFrom(typical: number): number {
  return Math.abs(typical) >= 100 ? Math.round(typical) : Number(typical.toPrecision(3));
}

function typesOf(property: Property): readonly string[] {
  const type = property['type'];
  return Array.isArray(type) ? type.filter(isText) : isText(type) ? [type] : [];
}

function optionsOf(property: Property, types: readonly string[]): readonly ChoiceOption[] {
  if (types.includes('boolean')) {
    return [
      { text: 'Yes', value: true },
      { text: 'No', value: false },
    ];
  }
  const known = levelsOf(property).flatMap((value) =>
    isText(value) || typeof value === 'number' || typeof value === 'boolean' ? [{ text: String(value), value }] : [],
  );
  return known.length > 0 && isOpen(property) ? [...known, SOMETHING_ELSE] : known;
}

/** A category that is open to other levels is written as a choice between its levels and any text. */
function alternativesOf(property: Property): readonly Property[] {
  return [property, ...[...listIn(property, 'anyOf'), ...listIn(property, 'oneOf')].filter(isObject)];
}

function levelsOf(property: Property): readonly unknown[] {
  return alternativesOf(property).flatMap((alternative) => listIn(alternative, 'enum'));
}

function isOpen(property: Property): boolean {
  const [, ...alternatives] = alternativesOf(property);
  return alternatives.some((alternative) => !('enum' in alternative) && typesOf(alternative).includes('string'));
}

function boundOf(property: Property, inclusive: string, exclusive: string): Bound | null {
  const value = numberIn(property, inclusive);
  const outer = numberIn(property, exclusive);
  return value !== null ? { value, inclusive: true } : outer !== null ? { value: outer, inclusive: false } : null;
}

function numberRangeOf(property: Property): Range<number> | null {
  const [least, greatest] = listIn(property, 'x-range');
  return Number.isFinite(least) && Number.isFinite(greatest)
    ? { least: Number(least), greatest: Number(greatest) }
    : null;
}

/** Days may come as ISO 8601 or as days since 1970-01-01. */
function dayRangeOf(property: Property): Range<string> | null {
  const [least, greatest] = listIn(property, 'x-range').map((end) =>
    isText(end) && /^\d{4}-\d{2}-\d{2}/.test(end)
      ? end.slice(0, 10)
      : typeof end === 'number' && Number.isFinite(end)
        ? new Date(end * MS_PER_DAY).toISOString().slice(0, 10)
        : null,
  );
  return least && greatest ? { least, greatest } : null;
}

function numberIn(property: Property, name: string): number | null {
  const value = property[name];
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}

function textIn(property: Property, name: string): string | null {
  const value = property[name];
  return isText(value) && value.trim() !== '' ? value : null;
}

function listIn(property: Property, name: string): readonly unknown[] {
  const value = property[name];
  return Array.isArray(value) ? value : [];
}

function isText(value: unknown): value is string {
  return typeof value === 'string';
}
