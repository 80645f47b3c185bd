import type { RequestHandler } from 'express';
import { permissions, type DeskOperation } from '../people/permissions';
import { requireAccess } from '../people/require-access';
import type { CsrfGuard } from './csrf-guard';

/** Right first, then the CSRF token; public operations have no session to protect. */
export function deskGuard(csrf: CsrfGuard): (operationId: string) => RequestHandler {
  return (operationId) => {
    const access = requireAccess(operationId);
    if (permissions[operationId as DeskOperation] === 'public') return access;
    return (request, response, next) => {
      access(request, response, (error?: unknown) =>
        error ? next(error) : csrf.requireToken(request, response, next),
      );
    };
  };
}
