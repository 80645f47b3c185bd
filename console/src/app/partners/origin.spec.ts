import { readOrigin } from './origin';

function complaintOf(text: string): string {
  const reading = readOrigin(text);
  return 'complaint' in reading ? reading.complaint : '';
}

describe('reading an origin', () => {
  it('takes scheme and host, and leaves out the usual port and a bare slash as a browser does', () => {
    expect(readOrigin(' https://WWW.partner.example:443/ ')).toEqual({ origin: 'https://www.partner.example' });
  });

  it('keeps an unusual port', () => {
    expect(readOrigin('http://localhost:4301')).toEqual({ origin: 'http://localhost:4301' });
  });

  it.each([
    'https://www.partner.example/boats',
    'https://www.partner.example/?page=2',
    'https://www.partner.example/#form',
  ])('refuses %s with the origin it would come to', (text) =>
    expect(complaintOf(text)).toContain('https://www.partner.example'),
  );

  it('refuses a name without a scheme, saying what to begin with', () => {
    expect(complaintOf('www.partner.example')).toContain('Begin with https://');
  });

  it('refuses a pattern, because hosts are compared by their full name', () => {
    expect(complaintOf('https://*.partner.example')).toContain('full name');
  });

  it.each(['', '   '])('asks for an origin when there is none (%p)', (text) => {
    expect(complaintOf(text)).toContain('Enter the site’s origin');
  });
});
