import type { operations } from '../../../openapi/types/desk';
import type { ContractRoutes } from '../http/contract-routes';
import { personOf } from '../people/session-passport';
import type { SettingsService } from './settings-service';

export function mountSettings(routes: ContractRoutes<operations>, settings: SettingsService): void {
  routes.answer('readSettings', () => settings.read());
  routes.answer('changeSettings', ({ body, request }) => settings.change(body, personOf(request)));
}
