import { doubleCsrf } from 'csrf-csrf';
import type { Request, RequestHandler, Response } from 'express';
import { DeskError } from '../errors';

const cookieName = 'XSRF-TOKEN';

export interface CsrfGuard {
  /** Sets the cookie for the session of this request and gives its value. */
  readonly issueToken: (request: Request, response: Response) => string;
  readonly requireToken: RequestHandler;
}

/**
 * A signed token bound to the session, under the names that Angular's HttpClient uses: it comes in the cookie
 * XSRF-TOKEN and goes back in the header X-XSRF-TOKEN. A script does the same.
 */
export function csrfGuard(secret: string, secure: boolean): CsrfGuard {
  const guard = doubleCsrf({
    getSecret: () => secret,
    getSessionIdentifier: (request) => request.session.id,
    cookieName,
    cookieOptions: { httpOnly: false, sameSite: 'strict', secure, path: '/' },
    getCsrfTokenFromRequest: (request) => request.get('x-xsrf-token'),
  });
  return {
    issueToken: (request, response) =>
      guard.generateCsrfToken(request, response, { overwrite: false, validateOnReuse: false }),
    requireToken: guard.doubleCsrfProtection,
  };
}

/** Signing in carries no token yet: a browser must say that the page is ours, a script says nothing. */
export function requireOwnSite(publicUrl: string): RequestHandler {
  return (request, _response, next) => {
    const site = request.get('sec-fetch-site');
    const origin = request.get('origin');
    const foreign =
      (site !== undefined && site !== 'same-origin') || (origin !== undefined && !isOwn(origin, publicUrl, request));
    next(foreign ? new DeskError('request-forged', 'Sign in from the console’s own page.') : undefined);
  };
}

function isOwn(origin: string, publicUrl: string, request: Request): boolean {
  return origin === publicUrl || origin === `${request.protocol}://${request.get('host')}`;
}
