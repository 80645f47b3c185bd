import type { operations } from '../../../../openapi/types/desk';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';
import { goneAway } from '../../http/gone-away';
import { personOf } from '../../people/session-passport';

export function mountMending(routes: ContractRoutes<operations>, room: RecordsRoom): void {
  const { recordMending, mendingDrafts } = room;
  routes.answer('mendRevision', ({ path, body, request }) => recordMending.mend(personOf(request).id, path.id, body));
  routes.answer('tryMending', ({ path, body, response }) =>
    recordMending.tryOut(path.id, body.steps, goneAway(response)),
  );
  routes.answer('readMendingDraft', ({ path, request }) => mendingDrafts.read(personOf(request).id, path.id));
  routes.answer('keepMendingDraft', ({ path, body, request }) =>
    mendingDrafts.keep(personOf(request).id, path.id, body.steps),
  );
}
