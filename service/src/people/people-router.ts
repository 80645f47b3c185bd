import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import type { InvitationService } from './invitation-service';
import type { PeopleService } from './people-service';
import { personOf } from './session-passport';

export interface PeopleRouterParts {
  readonly people: PeopleService;
  readonly invitations: InvitationService;
}

export function mountPeople(routes: ContractRoutes<operations>, { people, invitations }: PeopleRouterParts): void {
  routes.answer('listPeople', ({ query }) => people.list(pageOf(query)));
  routes.answer('invitePerson', ({ body, request }) => invitations.invite(body, personOf(request)));
  routes.answer('changePerson', ({ path, body, request }) => people.change(path.id, body, personOf(request)));
  routes.answer('readInvitation', ({ path }) => invitations.read(path.token));
  routes.answer('acceptInvitation', async ({ path, body }) => {
    await invitations.accept(path.token, body.password);
    return undefined;
  });
}
