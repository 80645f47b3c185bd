import session from 'express-session';
import { ConnectSessionKnexStore } from 'connect-session-knex';
import type { RequestHandler } from 'express';
import type { Knex } from 'knex';

export const sessionCookieName = 'tarebeam';
const idleMs = 60 * 60 * 1000;
const absoluteMs = 8 * 60 * 60 * 1000;

declare module 'express-session' {
  interface SessionData {
    startedAt?: number;
  }
}

export interface SessionOptions {
  readonly knex: Knex;
  readonly secret: string;
  /** True where the service is reached over https. */
  readonly secure: boolean;
  readonly cleanupIntervalMs: number;
}

/** Sessions in the database; an hour idle or eight hours in all end one. */
export function sessions(options: SessionOptions): RequestHandler[] {
  const store = new ConnectSessionKnexStore({
    knex: options.knex,
    tableName: 'sessions',
    createTable: false,
    cleanupInterval: options.cleanupIntervalMs,
  });
  const open = session({
    name: sessionCookieName,
    secret: options.secret,
    store,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { httpOnly: true, sameSite: 'strict', secure: options.secure, maxAge: idleMs, path: '/' },
  });
  const endOld: RequestHandler = (request, _response, next) => {
    const { startedAt } = request.session;
    if (startedAt === undefined || Date.now() - startedAt < absoluteMs) next();
    else request.session.regenerate(next);
  };
  return [open, endOld];
}
