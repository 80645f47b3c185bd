import { DeskError } from '../errors';
import { requireStrongPassword } from './password-strength';

const person = { name: 'Ada Ferris', email: 'ada.ferris@marlbay.example' };

describe('a password', () => {
  it.each([
    ['fourteen signs', 'fourteen signs'],
    ['the e-mail address', 'Ada.Ferris@marlbay.example'],
    ['the name, twice', 'ada ferris ada ferris'],
    ['the name with a year', 'Ada Ferris ada 2026'],
    ['one character repeated', 'aaaaaaaaaaaaaaaaaaaa'],
    ['a short piece repeated', 'abcabcabcabcabcabc'],
    ['blanks', '                    '],
    ['the alphabet', 'abcdefghijklmnopqrst'],
    ['a row of keys', 'qwertyuiopasdfghjkl'],
    ['digits in order, downwards too', '01234567899876543210'],
    ['common words', 'Password Welcome 12345'],
  ])('is refused when it is %s', (_what, password) => {
    expect(() => requireStrongPassword(password, person)).toThrow(DeskError);
  });

  it.each(['copper kettle nine ferries', 'grey heron on the slip', 'Zx9!vv-Lp03_qqRt', 'Πέντε καΐκια στο λιμάνι'])(
    'of unrelated words passes: %s',
    (password) => {
      expect(() => requireStrongPassword(password, person)).not.toThrow();
    },
  );

  it('counts characters, not the units that a computer keeps them in', () => {
    expect(() => requireStrongPassword('⛵🪝🧭🌊🐚🦀🪸', person)).toThrow(/fewer than 15/);
  });
});
