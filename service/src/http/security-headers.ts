import helmet from 'helmet';
import type { RequestHandler } from 'express';

export interface SecurityHeadersOptions {
  readonly secure: boolean;
}

/** Helmet's policy; over plain http, requests are not upgraded and no transport security is announced. */
export function securityHeaders({ secure }: SecurityHeadersOptions): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      directives: {
        'font-src': ["'self'"],
        'style-src': ["'self'", "'unsafe-inline'"],
        'upgrade-insecure-requests': secure ? [] : null,
      },
    },
    strictTransportSecurity: secure,
  });
}

/** What partners' pages load or call: usable from other origins. */
export const openToOtherOrigins: RequestHandler = (_request, response, next) => {
  response.setHeader('Cross-Origin-Resource-Policy', 'cross-origin');
  next();
};

/** Answers carry ids and figures of the desk: nothing between may keep them. */
export const noStore: RequestHandler = (_request, response, next) => {
  response.setHeader('Cache-Control', 'no-store');
  next();
};
