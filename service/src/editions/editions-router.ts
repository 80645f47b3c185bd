import type { components, operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import type { SignedInPerson } from '../people/person';
import { personOf } from '../people/session-passport';
import type { EditionReview } from './edition-review';
import type { EditionsService } from './editions-service';

export interface EditionsRouterParts {
  readonly editions: EditionsService;
  readonly review: EditionReview;
}

export function mountEditions(routes: ContractRoutes<operations>, { editions, review }: EditionsRouterParts): void {
  const after = async (
    person: SignedInPerson,
    id: string,
    step: Promise<void>,
  ): Promise<components['schemas']['Edition']> => {
    await step;
    return editions.read(person, id);
  };
  routes.answer('listEditions', ({ path, query }) => editions.list(path.slug, pageOf(query)));
  routes.answer('createEdition', ({ path, body, request }) => editions.drawUp(personOf(request), path.slug, body));
  routes.answer('readEdition', ({ path, request }) => editions.read(personOf(request), path.id));
  routes.answer('tryCase', ({ path, body }) => editions.tryCase(path.id, body.inputs));
  routes.answer('submitEdition', ({ path, request }) => {
    const person = personOf(request);
    return after(person, path.id, review.submit(person, path.id));
  });
  routes.answer('putEditionInForce', ({ path, request }) => {
    const person = personOf(request);
    return after(person, path.id, review.putInForce(person, path.id));
  });
  routes.answer('sendEditionBack', ({ path, body, request }) => {
    const person = personOf(request);
    return after(person, path.id, review.sendBack(person, path.id, body.note));
  });
  routes.answer('withdrawEdition', ({ path, body, request }) => {
    const person = personOf(request);
    return after(person, path.id, review.withdraw(person, path.id, body));
  });
}
