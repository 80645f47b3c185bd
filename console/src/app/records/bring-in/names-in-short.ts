const MOST_NAMES = 12;

/** Columns by name; a file of two thousand does not fill the page with them. */
export function namesInShort(names: readonly string[]): string {
  const shown = names.slice(0, MOST_NAMES).map((name) => `“${name}”`);
  const rest = names.length - shown.length;
  return rest > 0 ? `${shown.join(', ')} and ${rest} more` : shown.join(', ');
}
