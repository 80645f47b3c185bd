import type { operations } from '../../../../openapi/types/desk';
import type { KeepingRoom } from '../../compose-keeping';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';
import { sendDownload } from '../../http/send-download';
import { personOf } from '../../people/session-passport';

/** What changes a record set, lets a revision go, or carries it away as a file. */
export function mountKeeping(
  routes: ContractRoutes<operations>,
  room: KeepingRoom & Pick<RecordsRoom, 'records'>,
): void {
  const { records, setChanges, revisionDeletions, revisionExports } = room;
  routes.answer('changeRecordSet', async ({ path, body, request }) => {
    await setChanges.change(personOf(request).id, path.id, body);
    return records.readSet(path.id);
  });
  routes.answer('readRevisionDeletion', ({ path }) => revisionDeletions.outlook(path.id));
  routes.answer('deleteRevision', async ({ path, request }) => {
    await revisionDeletions.remove(personOf(request), path.id);
    return undefined;
  });
  routes.handle('exportRevision', async ({ path, response }) => {
    await sendDownload(response, { ...(await revisionExports.open(path.id)), type: 'text/csv' });
  });
}
