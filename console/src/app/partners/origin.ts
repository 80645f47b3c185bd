/** A site as its partner typed it: an origin the service can compare, or what to change about it. */
export type OriginReading = { readonly origin: string } | { readonly complaint: string };

const EXAMPLE = 'https://www.partner.example';

/**
 * Reads an origin (RFC 6454): scheme, host and, where it is not the usual one, port. A path is refused with the origin
 * it would come to, rather than cut off in silence: whoever lists a page may believe that only that page is let in.
 */
export function readOrigin(text: string): OriginReading {
  const typed = text.trim();
  if (typed === '') return { complaint: `Enter the site’s origin, such as ${EXAMPLE}` };
  if (typed.includes('*'))
    return { complaint: 'List each host by its full name: a pattern such as *.partner.example lets nothing in.' };
  if (!/^https?:\/\//i.test(typed)) return { complaint: `Begin with https://, such as ${EXAMPLE}` };
  const url = parsed(typed);
  if (url === undefined) return { complaint: `This is not an address a browser could open. Write it as ${EXAMPLE}` };
  return hasMoreThanOrigin(url)
    ? { complaint: `Leave out everything after the host and port: ${url.origin}` }
    : { origin: url.origin };
}

function parsed(text: string): URL | undefined {
  return URL.canParse(text) ? new URL(text) : undefined;
}

function hasMoreThanOrigin(url: URL): boolean {
  return url.pathname !== '/' || url.search !== '' || url.hash !== '' || url.username !== '' || url.password !== '';
}
