import { liveRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { Notices } from './notices-service';

export function registerNoticesRoutes(routes: Routes, notices: Notices): void {
  routes.guarded(liveRoutes.listNotifications, ({ actor }) => notices.list(actor.gymId, actor.userId));
  routes.guarded(liveRoutes.readNotifications, async ({ actor, body }) => {
    await notices.markRead(actor.gymId, actor.userId, body.ids ?? null);
    return undefined;
  });
}
