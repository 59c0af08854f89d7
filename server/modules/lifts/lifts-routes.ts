import { libraryRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { Lifts } from './lifts-service';

export function registerLiftsRoutes(routes: Routes, lifts: Lifts): void {
  routes.guarded(libraryRoutes.listLifts, async ({ actor }) => ({ items: await lifts.list(actor) }));
  routes.guarded(libraryRoutes.createLift, ({ actor, body }) => lifts.create(actor, body));
  routes.guarded(libraryRoutes.getLift, ({ actor, params }) => lifts.get(actor, params.id));
  routes.guarded(libraryRoutes.changeLift, ({ actor, params, body }) => lifts.change(actor, params.id, body));
}
