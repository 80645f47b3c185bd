import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { personOf } from '../people/session-passport';
import type { DeskService } from './desk-service';

export function mountDesk(routes: ContractRoutes<operations>, desk: DeskService): void {
  routes.answer('readDesk', ({ request }) => desk.read(personOf(request)));
}
