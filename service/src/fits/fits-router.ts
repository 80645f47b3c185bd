import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { pageOf } from '../http/page';
import { personOf } from '../people/session-passport';
import { openEventStream } from './event-stream';
import type { FitsService } from './fits-service';

export function mountFits(routes: ContractRoutes<operations>, fits: FitsService): void {
  routes.answer('listFits', ({ path, query }) => fits.list(path.slug, pageOf(query)));
  routes.answer('startFit', ({ path, body, request }) => fits.start(personOf(request), path.slug, body));
  routes.answer('readFit', ({ path }) => fits.read(path.id));
  routes.answer('cancelFit', ({ path, request }) => fits.cancel(personOf(request), path.id));
  routes.handle('followFit', async ({ path, response }) => {
    await fits.progress(path.id);
    let stop = (): void => undefined;
    const stream = openEventStream(response, () => stop());
    stop = fits.follow(path.id, { step: (step) => stream.send('progress', step), end: () => stream.end() });
  });
}
