import type { RequestHandler } from 'express';
import { Passport } from 'passport';
import { HeaderAPIKeyStrategy } from 'passport-headerapikey';
import { DeskError } from '../errors';
import type { KeysService } from './keys-service';
import type { PartnerKey } from './partner-key';

/** Recognises the key of a call. Its own Passport, without sessions: a key is looked up anew for every call. */
export function recogniseKey(keys: KeysService): RequestHandler {
  const passport = new Passport();
  passport.use(
    new HeaderAPIKeyStrategy({ header: 'X-Api-Key', prefix: '' }, false, (text, done) => {
      keys.recognise(text).then(
        (key) => done(null, key),
        (error: Error) => done(error),
      );
    }),
  );
  return (request, response, next) => {
    const finish = (error: unknown, key?: PartnerKey | false): void => {
      if (error) return next(error);
      if (!key) return next(new DeskError('key-missing', 'The desk issues keys; see the documentation at /docs.'));
      request.partnerKey = key;
      next();
    };
    (passport.authenticate('headerapikey', { session: false }, finish) as RequestHandler)(request, response, next);
  };
}
