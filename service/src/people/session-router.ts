import type { RequestHandler } from 'express';

import type { components, operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import type { CsrfGuard } from '../http/csrf-guard';
import type { Settings } from '../settings/settings';
import { personOf, type SessionPassport } from './session-passport';

type Session = components['schemas']['Session'];

export interface SessionRouterParts {
  readonly passport: SessionPassport;
  readonly csrf: CsrfGuard;
  readonly settings: Settings;
  readonly requireOwnSite: RequestHandler;
}

export function mountSession(routes: ContractRoutes<operations>, parts: SessionRouterParts): void {
  const authenticate = parts.passport.authenticate('local') as RequestHandler;

  async function answer(
    request: Parameters<typeof personOf>[0],
    response: Parameters<RequestHandler>[1],
  ): Promise<Session> {
    const { id, name, email, roles, partnerId } = personOf(request);
    const { deskName } = await parts.settings.read();
    return {
      person: { id, name, email, roles: [...roles], partnerId },
      csrfToken: parts.csrf.issueToken(request, response),
      deskName,
    };
  }
  const run = (
    handler: RequestHandler,
    request: Parameters<RequestHandler>[0],
    response: Parameters<RequestHandler>[1],
  ): Promise<void> =>
    new Promise((resolve, reject) =>
      handler(request, response, (error?: unknown) => (error ? reject(error) : resolve())),
    );

  routes.answer('readHealth', () => ({ status: 'ok' as const }));
  routes.answer('readSession', ({ request, response }) => answer(request, response));
  routes.answer('signIn', async ({ request, response }) => {
    await run(parts.requireOwnSite, request, response);
    await run(authenticate, request, response);
    request.session.startedAt = Date.now();
    return answer(request, response);
  });
  routes.answer('signOut', async ({ request, response }) => {
    await new Promise<void>((resolve, reject) =>
      request.session.destroy((error) => (error ? reject(error) : resolve())),
    );
    response.clearCookie('tarebeam').clearCookie('XSRF-TOKEN').setHeader('Clear-Site-Data', '"cache", "storage"');
    return undefined;
  });
}
