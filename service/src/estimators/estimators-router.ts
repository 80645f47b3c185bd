import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import { personOf } from '../people/session-passport';
import type { EstimatorsService } from './estimators-service';

export function mountEstimators(routes: ContractRoutes<operations>, estimators: EstimatorsService): void {
  routes.answer('listEstimators', ({ query }) => estimators.list(pageOf(query)));
  routes.answer('createEstimator', ({ body, request }) => estimators.create(personOf(request), body));
  routes.answer('readEstimator', ({ path }) => estimators.read(path.slug));
  routes.answer('changeEstimator', ({ path, body, request }) => estimators.change(personOf(request), path.slug, body));
}
