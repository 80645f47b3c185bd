/** `a`, `a and b`, `a, b and c`. */
export function listed(parts: readonly (string | number)[]): string {
  if (parts.length < 2) return parts.join('');
  return `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
}
