import type { operations } from '../../../../openapi/types/desk';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';
import { personOf } from '../../people/session-passport';

export function mountMending(routes: ContractRoutes<operations>, { recordMending }: RecordsRoom): void {
  routes.answer('mendRevision', ({ path, body, request }) =>
    recordMending.mend(personOf(request).id, path.id, body.steps),
  );
}
