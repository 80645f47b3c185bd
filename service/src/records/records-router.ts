import type { operations } from '../../../openapi/types/desk';
import type { RecordsRoom } from '../compose-records';
import type { ContractRoutes } from '../http/contract-routes';
import { goneAway } from '../http/gone-away';
import { pageOf } from '../http/page';
import { sendDownload } from '../http/send-download';
import { personOf } from '../people/session-passport';
import { mountIncoming } from './incoming/incoming-router';
import { mountLooking } from './looking/looking-router';
import { mountMending } from './mending/mending-router';
import { mountTasks } from './tasks/tasks-router';

export function mountRecords(routes: ContractRoutes<operations>, room: RecordsRoom): void {
  const { records } = room;
  mountIncoming(routes, room);
  mountLooking(routes, room);
  mountMending(routes, room);
  mountTasks(routes, room);
  routes.answer('listRecordSets', ({ query }) => records.list(pageOf(query)));
  routes.answer('createRecordSet', ({ request, response }) =>
    records.createFromForm(personOf(request).id, request, goneAway(response)),
  );
  routes.answer('readRecordSet', ({ path }) => records.readSet(path.id));
  routes.answer('createRevision', ({ path, request, response }) =>
    records.reviseFromForm(path.id, personOf(request).id, request, goneAway(response)),
  );
  routes.answer('readRevision', ({ path }) => records.readRevision(path.id));
  routes.handle('readRevisionOriginal', async ({ path, response }) => {
    await sendDownload(response, { ...(await records.original(path.id)), type: 'application/octet-stream' });
  });
}
