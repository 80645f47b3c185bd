import cors from 'cors';
import type { Request, RequestHandler } from 'express';
import type { Logger } from 'pino';
import { DeskError } from '../errors';
import type { KeysService } from './keys-service';
import { partnerKeyOf } from './partner-key';

/** Chromium keeps a preflight's answer no longer than this. */
const preflightKeptS = 7200;
const readable = ['RateLimit', 'RateLimit-Policy', 'Retry-After', 'X-Request-Id'];

export interface OriginRules {
  readonly keys: KeysService;
  readonly log: Logger;
  /** The service's own address: its documentation page may try a partner key. */
  readonly publicUrl: string;
}

/**
 * A preflight names headers but not the key, so it is answered for every origin that any partner lists; the call itself is
 * then held to the key's own partner. Errors carry the fields too, so that the form can read them.
 */
export function answerListedOrigins({ keys, log }: Pick<OriginRules, 'keys' | 'log'>): RequestHandler {
  const listed = cors({
    origin: true,
    methods: ['GET', 'POST'],
    allowedHeaders: ['Content-Type', 'X-Api-Key'],
    exposedHeaders: readable,
    maxAge: preflightKeptS,
    credentials: false,
    optionsSuccessStatus: 204,
  });
  return (request, response, next) => {
    response.vary('Origin');
    const origin = request.get('origin');
    if (origin === undefined) return next();
    keys.isSiteOfAnyone(origin).then((isListed) => {
      if (isListed) return listed(request, response, next);
      if (request.method !== 'OPTIONS') return next();
      // The page is told nothing by its browser, so the desk's log must.
      log.warn({ origin, requestId: request.requestId }, 'a site that nobody lists asked to call');
      return next(
        new DeskError(
          'site-not-listed',
          `${origin} is not listed by any partner. List it in the partner’s sites, exactly so.`,
        ),
      );
    }, next);
  };
}

/**
 * An embed key works from its partner's sites only; a partner key is a server's secret and never works from another site's
 * page. This stops other web sites in ordinary browsers, not programs, which may claim any origin.
 */
export function requireListedOrigin({ keys, log, publicUrl }: OriginRules): RequestHandler {
  const refuse = (request: Request, detail: string): DeskError => {
    const { id, kind } = partnerKeyOf(request);
    log.warn(
      { keyId: id, keyKind: kind, origin: request.get('origin') ?? null, requestId: request.requestId },
      'a key was used from a site that is not listed',
    );
    return new DeskError('site-not-listed', detail);
  };
  return (request, _response, next) => {
    const key = partnerKeyOf(request);
    const origin = request.get('origin');
    if (key.kind === 'partner') {
      const isForeign =
        origin !== undefined && origin !== publicUrl && origin !== `${request.protocol}://${request.get('host')}`;
      return next(
        isForeign
          ? refuse(
              request,
              'A partner key belongs on your server, never in a page. Replace it, and use an embed key in pages.',
            )
          : undefined,
      );
    }
    if (origin === undefined || origin === 'null')
      return next(refuse(request, 'An embed key works from the pages of listed sites only; this call named no site.'));
    keys
      .isSiteOf(key, origin)
      .then(
        (isListed) =>
          next(
            isListed
              ? undefined
              : refuse(
                  request,
                  `${origin} is not listed for this key’s partner. List it in the partner’s sites, exactly so.`,
                ),
          ),
        next,
      );
  };
}
