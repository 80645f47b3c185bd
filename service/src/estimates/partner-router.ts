import type { operations } from '../../../openapi/types/partner';
import type { ContractRoutes } from '../http/contract-routes';
import { partnerKeyOf } from '../keys/partner-key';
import type { EstimatesService } from './estimates-service';
import type { PublishedEstimators } from './published-estimators';

export interface PartnerRouterParts {
  readonly published: PublishedEstimators;
  readonly estimates: EstimatesService;
}

export function mountPartnerEstimates(
  routes: ContractRoutes<operations>,
  { published, estimates }: PartnerRouterParts,
): void {
  routes.answer('listPublishedEstimators', ({ request }) => published.list(partnerKeyOf(request)));
  routes.answer('describeEstimator', ({ path, request }) => published.describe(partnerKeyOf(request), path.slug));
  routes.answer('createEstimate', ({ path, body, request }) =>
    estimates.estimate({ key: partnerKeyOf(request), slug: path.slug, ...body }),
  );
  routes.answer('readOwnEstimate', ({ path, request }) => estimates.readOwn(partnerKeyOf(request), path.id));
}
