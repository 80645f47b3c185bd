import { DeskError } from '../errors';

const localHosts = ['localhost', '127.0.0.1', '[::1]'];
const plainHost = /^([a-z0-9]([a-z0-9_-]*[a-z0-9])?)(\.[a-z0-9]([a-z0-9_-]*[a-z0-9])?)*$/;

const invalid = (detail: string): DeskError =>
  new DeskError('site-invalid', detail, { errors: [{ pointer: '#/origin', detail }] });

function parse(text: string): URL {
  // Without a scheme, `partner.example:8443` would be read as a scheme of its own.
  if (!/^[a-z][a-z0-9+.-]*:\/\//i.test(text)) {
    const guess = text.includes('.') ? `https://${text}` : '';
    throw invalid(
      URL.canParse(guess)
        ? `The address has no scheme. Write ${new URL(guess).origin}.`
        : 'Write the site as https://www.partner.example.',
    );
  }
  if (!URL.canParse(text))
    throw invalid(
      'The address cannot be read. Write it as https://www.partner.example, with a port only if the site has one.',
    );
  return new URL(text);
}

function requirePlain(url: URL, text: string): void {
  if (!/^https?:$/.test(url.protocol)) throw invalid(`Pages are served over https. Write https://${url.host}.`);
  const local = localHosts.includes(url.hostname);
  if (!local && !plainHost.test(url.hostname)) {
    throw invalid(
      'Write one host by its full name, without stars: list every site by itself, such as https://www.partner.example.',
    );
  }
  if (url.protocol === 'http:' && !local) throw invalid(`Write https://${url.host}; http is taken for localhost only.`);
  const more = url.username !== '' || url.password !== '' || url.pathname !== '/' || /[?#\\]/.test(text);
  if (more) throw invalid(`Leave out everything but scheme, host and port. Write ${url.origin}.`);
}

/**
 * The origin as browsers send it: lower case, international names in their ASCII form, no default port.
 * Compared letter for letter with the header `Origin`, so nothing else may be in it.
 */
export function siteOrigin(text: string): string {
  const trimmed = text.trim();
  const url = parse(trimmed);
  requirePlain(url, trimmed);
  return url.origin;
}
