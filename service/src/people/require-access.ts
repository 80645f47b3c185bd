import type { RequestHandler } from 'express';
import { DeskError } from '../errors';
import { permissions, type DeskOperation } from './permissions';
import { personOf } from './session-passport';

/** Refuses a call whose person lacks the right; an operation missing from the table is refused to all. */
export function requireAccess(operationId: string): RequestHandler {
  const access = permissions[operationId as DeskOperation];
  return (request, _response, next) => {
    if (access === 'public') return next();
    const person = personOf(request);
    if (access === 'signed-in' || access?.some((role) => person.roles.includes(role))) return next();
    const who = (access ?? []).join(' or ');
    return next(
      new DeskError(
        'not-permitted',
        `Ask ${who === '' ? 'an administrator' : `someone with the role ${who}`} to do this.`,
      ),
    );
  };
}
