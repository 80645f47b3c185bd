/** `edition-put-in-force` to `Edition put in force`: actions and kinds are written as words joined by hyphens. */
export function wordsOf(name: string): string {
  const words = name.replaceAll('-', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}
