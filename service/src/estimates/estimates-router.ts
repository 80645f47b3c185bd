import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import type { EstimateTraces } from './estimate-traces';

export function mountEstimates(routes: ContractRoutes<operations>, traces: EstimateTraces): void {
  routes.answer('listEstimates', ({ path, query }) => traces.list(path.slug, pageOf(query)));
  routes.answer('readEstimate', ({ path }) => traces.read(path.id));
}
