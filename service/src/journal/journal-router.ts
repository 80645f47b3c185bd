import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import type { JournalService } from './journal-service';

export function mountJournal(routes: ContractRoutes<operations>, journal: JournalService): void {
  routes.answer('listJournal', ({ query: { limit, offset, ...filter } }) =>
    journal.list(filter, pageOf({ limit, offset })),
  );
}
