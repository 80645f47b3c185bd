import { lengthOf, lengthWords, passwordComplaint } from './password-length';

describe('the length of a password', () => {
  it('counts characters as people do, whatever they are made of', () => {
    expect(lengthOf('ñandú')).toBe(5);
    expect(lengthOf('n\u0303andu\u0301')).toBe(5);
    expect(lengthOf('🚤🚤')).toBe(2);
  });

  it('lets 15 characters pass, spaces among them, and says how many 14 lack', () => {
    expect(passwordComplaint('a b c d e f g h')).toBeUndefined();
    expect(passwordComplaint('a b c d e f g ')).toContain('it has 14 of at least 15');
    expect(lengthWords(14)).toContain('1 to go.');
    expect(lengthWords(15)).not.toContain('to go');
  });

  it('asks for one, and stops at what the service takes', () => {
    expect(passwordComplaint('')).toBe('Enter a password');
    expect(passwordComplaint('x'.repeat(257))).toContain('shorter');
  });
});
