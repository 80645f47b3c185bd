import type { operations } from '../../../../openapi/types/desk';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';

/** What shows a revision without changing it. */
export function mountLooking(routes: ContractRoutes<operations>, { recordFindings }: RecordsRoom): void {
  routes.answer('listRevisionFindings', ({ path, query }) => recordFindings.list(path.id, query.target));
}
