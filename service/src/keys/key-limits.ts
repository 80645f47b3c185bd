import type { RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { DeskError } from '../errors';
import { partnerKeyOf } from './partner-key';

const minuteMs = 60_000;
/** Calls of one address without a good key, a minute. */
export const mostRefusalsPerMinute = 30;

const exceeded =
  (advice: string): RequestHandler =>
  (_request, response, next) => {
    const retryAfter = Number(response.getHeader('Retry-After') ?? 60);
    next(new DeskError('rate-exceeded', `Wait ${retryAfter} s. ${advice}`, { retryAfter }));
  };

/** Each key has calls a minute of its own, counted by its row. Fields as in the Internet-Draft ratelimit-headers-08. */
export function limitPerKey(): RequestHandler {
  return rateLimit({
    windowMs: minuteMs,
    identifier: 'per-key-minute',
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    passOnStoreError: false,
    limit: (request) => partnerKeyOf(request).perMinute,
    keyGenerator: (request) => partnerKeyOf(request).id,
    handler: exceeded('Spread your calls, or ask the desk for more calls a minute.'),
  });
}

/** Calls of one visitor of a partner's pages, a minute and key. */
export const mostEmbedCallsPerAddressMinute = 30;

/** An embed key is public, so no single visitor may use up its minute. Partner keys come from servers and are not counted. */
export function limitPerVisitor(): RequestHandler {
  return rateLimit({
    windowMs: minuteMs,
    identifier: 'per-visitor-minute',
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    passOnStoreError: false,
    limit: mostEmbedCallsPerAddressMinute,
    skip: (request) => partnerKeyOf(request).kind === 'partner',
    keyGenerator: (request) => `${partnerKeyOf(request).id} ${ipKeyGenerator(request.ip ?? '')}`,
    handler: exceeded('This form has been used very often from your connection.'),
  });
}

/**
 * Bounds guessing: an address whose calls are refused too often is refused without a look at its key. Calls with a good key
 * are not counted, so that many people behind one address do not get in each other's way.
 */
export function limitRefusals(recognise: RequestHandler): RequestHandler {
  const limiter = rateLimit({
    windowMs: minuteMs,
    identifier: 'refused-per-address-minute',
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    passOnStoreError: false,
    limit: mostRefusalsPerMinute,
    handler: exceeded('Too many calls came from your address without a good key. Check the key before you call again.'),
  });
  return (request, response, next) => {
    const count = (refusal: unknown): void =>
      void limiter(request, response, (broken?: unknown) => next(broken ?? refusal));
    Promise.resolve(limiter.getKey(ipKeyGenerator(request.ip ?? ''))).then((known) => {
      if (known && known.totalHits >= mostRefusalsPerMinute) return count(undefined);
      return recognise(request, response, (error?: unknown) => {
        if (error instanceof DeskError && error.status === 401) count(error);
        else next(error);
      });
    }, next);
  };
}
