/**
 * One text for one value: JSON without spaces, the names of every object in code-unit order, numbers as ECMAScript writes
 * them (the shortest text that reads back to the same bits). So a checksum over the text is a checksum over the value.
 * The same rules as RFC 8785. Throws for what JSON cannot hold.
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value);
  if (typeof value === 'number') return numberText(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value === 'object' && !ArrayBuffer.isView(value))
    return objectText(value as Readonly<Record<string, unknown>>);
  throw new TypeError(`There is no JSON for ${typeof value === 'object' ? 'a typed array' : typeof value}.`);
}

function numberText(value: number): string {
  if (!Number.isFinite(value)) throw new TypeError(`There is no JSON for ${value}.`);
  return JSON.stringify(value);
}

function objectText(value: Readonly<Record<string, unknown>>): string {
  const names = Object.keys(value).filter((name) => value[name] !== undefined);
  return `{${names
    .sort()
    .map((name) => `${JSON.stringify(name)}:${canonicalJson(value[name])}`)
    .join(',')}}`;
}
