import type { operations } from '../../../../openapi/types/desk';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';

export function mountTasks(routes: ContractRoutes<operations>, { recordTasks }: RecordsRoom): void {
  routes.answer('readRecordTask', ({ path }) => recordTasks.read(path.id));
  routes.answer('cancelRecordTask', ({ path }) => recordTasks.cancel(path.id));
}
