import { takeRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { TakesService } from './takes-service';

export function registerTakesRoutes(routes: Routes, service: TakesService): void {
  routes.guarded(takeRoutes.createTake, ({ actor, params, body }) => service.create(actor, params.id, body));
  routes.guarded(takeRoutes.changeTake, ({ actor, params, body }) => service.change(actor, params.id, body));
  routes.guarded(takeRoutes.submitTake, ({ actor, params }) => service.submit(actor, params.id));
  routes.guarded(takeRoutes.withdrawTake, ({ actor, params }) => service.withdraw(actor, params.id));
  routes.guarded(takeRoutes.retryTake, ({ actor, params }) => service.retry(actor, params.id));
  routes.guarded(takeRoutes.getTake, ({ actor, params }) => service.get(actor, params.id));
  routes.guarded(takeRoutes.listTakes, ({ actor, query }) => service.list(actor, query));
  routes.guarded(takeRoutes.markRead, async ({ actor, params }) => {
    await service.markRead(actor, params.id);
    return undefined;
  });
  routes.guarded(takeRoutes.getProgress, ({ actor, query }) => service.progress(actor, query.memberId));
}
