import { boardRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { QueueService } from './queue-service';

export function registerQueueRoutes(routes: Routes, service: QueueService): void {
  routes.guarded(boardRoutes.getQueue, ({ actor, query }) => service.list(actor, query));
  routes.guarded(boardRoutes.pickUp, ({ actor, params }) => service.pickUp(actor, params.id));
  routes.guarded(boardRoutes.putBack, async ({ actor, params }) => {
    await service.putBack(actor, params.id);
    return undefined;
  });
}
