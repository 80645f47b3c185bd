import type { operations } from '../../../../openapi/types/desk';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';
import { goneAway } from '../../http/gone-away';
import { personOf } from '../../people/session-passport';

/** Files on their way in. */
export function mountIncoming(routes: ContractRoutes<operations>, { incomingFiles }: RecordsRoom): void {
  routes.answer('receiveFile', ({ request, response }) =>
    incomingFiles.receive(personOf(request).id, request, goneAway(response)),
  );
  routes.answer('readIncomingFile', ({ path, request, response }) =>
    incomingFiles.read(personOf(request).id, path.id, goneAway(response)),
  );
  routes.answer('discardIncomingFile', async ({ path, request }) => {
    await incomingFiles.discard(personOf(request).id, path.id);
    return undefined;
  });
  routes.answer('proposeReading', ({ path, query, body, request, response }) =>
    incomingFiles.propose(personOf(request).id, path.id, {
      choices: body,
      appendTo: query.appendTo,
      signal: goneAway(response),
    }),
  );
  routes.answer('bringInFile', ({ path, body, request }) => incomingFiles.bringIn(personOf(request).id, path.id, body));
}
