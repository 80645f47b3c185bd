import { emailComplaint, nameComplaint } from './text-rules';

describe('complaints about typed text', () => {
  it.each(['name@partner.example', ' a.b+c@mail.partner.example '])('lets %p pass as an address', (text) => {
    expect(emailComplaint(text)).toBeUndefined();
  });

  it.each(['', 'name', 'name@partner', 'two words@partner.example', `${'a'.repeat(250)}@x.example`])(
    'complains about %p',
    (text) => {
      expect(emailComplaint(text)).toBeDefined();
    },
  );

  it('asks for a name that is blank, and says how far one is too long', () => {
    expect(nameComplaint('  ', 'the partner’s name')).toBe('Enter the partner’s name');
    expect(nameComplaint('x'.repeat(121), 'a name')).toBe('Shorten it to 120 characters; it has 121');
    expect(nameComplaint(' Northquay ', 'a name')).toBeUndefined();
  });
});
