import { accountRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { GymsService } from './gyms-service';

export function registerGymsRoutes(routes: Routes, gyms: GymsService): void {
  routes.guarded(accountRoutes.getGym, ({ actor }) => gyms.get(actor));
  routes.guarded(accountRoutes.changeGym, ({ actor, body }) => gyms.change(actor, body));
}
