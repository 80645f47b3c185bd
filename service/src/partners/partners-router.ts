import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import { personOf } from '../people/session-passport';
import type { PartnersService } from './partners-service';
import type { SitesService } from './sites-service';

export interface PartnersRouterParts {
  readonly partners: PartnersService;
  readonly sites: SitesService;
}

export function mountPartners(routes: ContractRoutes<operations>, { partners, sites }: PartnersRouterParts): void {
  routes.answer('listPartners', ({ query }) => partners.list(pageOf(query)));
  routes.answer('createPartner', ({ body, request }) => partners.create(body, personOf(request)));
  routes.answer('readPartner', ({ path, request }) => partners.read(path.id, personOf(request)));
  routes.answer('changePartner', ({ path, body, request }) => partners.change(path.id, body, personOf(request)));
  routes.answer('addSite', ({ path, body, request }) => sites.add(path.id, body.origin, personOf(request)));
  routes.answer('removeSite', async ({ path, request }) => {
    await sites.remove(path.id, path.siteId, personOf(request));
    return undefined;
  });
}
