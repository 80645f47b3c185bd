import { DeskError } from '../errors';

/** NIST SP 800-63B: length counts where there is no second factor; no rules about kinds of character. */
export const leastPasswordLength = 15;

/** Runs that people type without thinking; a password made of nothing else is easy to guess. */
const runs = [
  'abcdefghijklmnopqrstuvwxyz',
  '01234567890',
  'qwertyuiop',
  'asdfghjkl',
  'zxcvbnm',
  'qwertzuiop',
  'azertyuiop',
];
/** Words that the lists of most used passwords are made of (from memory). */
const commonWords = [
  'password',
  'passphrase',
  'letmein',
  'welcome',
  'admin',
  'administrator',
  'iloveyou',
  'changeme',
  'secret',
  'login',
  'tarebeam',
  'monkey',
  'dragon',
];

const plain = (text: string): string =>
  text
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[\s._@+-]+/g, '');

/** True for `aaaa…` and for one short piece said again and again (`abcabcabc…`). */
function repeatsItself(text: string): boolean {
  for (let length = 1; length <= Math.min(6, text.length / 2); length += 1) {
    const piece = text.slice(0, length);
    if (piece.repeat(Math.ceil(text.length / length)).slice(0, text.length) === text) return true;
  }
  return false;
}

/** What is left when every common word and every run of four or more is taken out. */
function withoutCommonParts(text: string): string {
  const words = commonWords.reduce((rest, word) => rest.replaceAll(word, ''), text);
  const sequences = [...runs, ...runs.map((run) => [...run].reverse().join(''))];
  let rest = words;
  for (const sequence of sequences) {
    for (let length = sequence.length; length >= 4; length -= 1) {
      for (let start = 0; start + length <= sequence.length; start += 1)
        rest = rest.replaceAll(sequence.slice(start, start + length), '');
    }
  }
  return rest;
}

function weaknessOf(password: string, person: { readonly name: string; readonly email: string }): string | null {
  if ([...password.normalize('NFKC')].length < leastPasswordLength)
    return `It has fewer than ${leastPasswordLength} characters.`;
  const text = plain(password);
  const own = `${person.name} ${person.email}`
    .split(/[\s._@+-]+/)
    .map(plain)
    .filter((word) => word.length >= 3);
  const rest = own.reduce((left, word) => left.replaceAll(word, ''), text);
  if (rest.length < 6 && rest !== text) return 'It is your name or your e-mail address.';
  if (repeatsItself(text)) return 'It says the same thing again and again.';
  if (withoutCommonParts(text).length < 6) return 'It is a common word or a row of neighbouring keys.';
  return null;
}

export function requireStrongPassword(
  password: string,
  person: { readonly name: string; readonly email: string },
): void {
  const weakness = weaknessOf(password, person);
  if (weakness === null) return;
  const errors = [{ pointer: '#/password', detail: weakness }];
  throw new DeskError('password-too-weak', `${weakness} Take a few unrelated words instead.`, { errors });
}
