/** How exports write "no reading". Compared trimmed and in lower case. `none` is not among them: it is an answer. */
const marks: ReadonlySet<string> = new Set([
  '',
  'na',
  'n/a',
  'n.a.',
  '#n/a',
  '#na',
  'nan',
  'null',
  'missing',
  '-',
  '--',
  '–',
  '—',
  '.',
  '?',
  '#value!',
  '#div/0!',
  '#ref!',
  '#name?',
  '#num!',
  '#null!',
]);

const longestMark = 8;

export function isMissing(text: string): boolean {
  if (text.length === 0) return true;
  const trimmed = text.trim();
  return trimmed.length <= longestMark && marks.has(trimmed.toLowerCase());
}
