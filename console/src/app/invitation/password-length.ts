/** NIST SP 800-63B: where there is no second factor length is what counts; kinds of character are not asked for. */
export const LEAST_CHARACTERS = 15;
export const MOST_CHARACTERS = 256;

/** Characters as people count them, in the form in which the service counts. */
export function lengthOf(password: string): number {
  return [...password.normalize('NFKC')].length;
}

export function lengthWords(length: number): string {
  const advice = `At least ${LEAST_CHARACTERS} characters; a few unrelated words make a good one.`;
  if (length === 0 || length >= LEAST_CHARACTERS) return advice;
  return `${advice} ${LEAST_CHARACTERS - length} to go.`;
}

export function passwordComplaint(password: string): string | undefined {
  const length = lengthOf(password);
  if (length === 0) return 'Enter a password';
  if (length < LEAST_CHARACTERS) return `Make it longer: it has ${length} of at least ${LEAST_CHARACTERS} characters`;
  return length > MOST_CHARACTERS
    ? `Make it shorter: it has ${length} of at most ${MOST_CHARACTERS} characters`
    : undefined;
}
