import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { personOf } from '../people/session-passport';
import type { KeysService } from './keys-service';

export function mountKeys(routes: ContractRoutes<operations>, keys: KeysService): void {
  routes.answer('issueKey', ({ path, body, request }) => keys.issue(personOf(request), path.id, body));
  routes.answer('revokeKey', ({ path, request }) => keys.revoke(personOf(request), path.id));
}
