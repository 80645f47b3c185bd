import type { operations } from '../../../../openapi/types/desk';
import type { RecordsRoom } from '../../compose-records';
import type { ContractRoutes } from '../../http/contract-routes';
import { pageOf } from '../../http/page';

/** What shows a revision without changing it. */
export function mountLooking(routes: ContractRoutes<operations>, { recordFindings, recordLooking }: RecordsRoom): void {
  routes.answer('listRevisionFindings', ({ path, query }) => recordFindings.list(path.id, query.target));
  routes.answer('listRevisionRows', ({ path, query }) =>
    recordLooking.listRows(path.id, { ...pageOf(query), where: query.where, numbers: query.numbers }),
  );
  routes.answer('readCorrelations', ({ path }) => recordLooking.correlations(path.id));
  routes.answer('readScatter', ({ path, query }) => recordLooking.scatter(path.id, query.x, query.y));
  routes.answer('compareRevisions', ({ path, query }) => recordLooking.compare(path.id, query.with, query.key));
}
