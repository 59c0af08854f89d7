import { ownerRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { TurnaroundService } from './turnaround-service';

export function registerTurnaroundRoutes(routes: Routes, service: TurnaroundService): void {
  routes.guarded(ownerRoutes.getTurnaround, ({ actor, query }) => service.figures(actor, query));
  routes.stream(ownerRoutes.getTurnaroundCsv, async ({ actor, query, res }) => {
    const csv = await service.csv(actor, query);
    res
      .set({
        'Cache-Control': 'no-store',
        'Content-Disposition': 'attachment; filename="turnaround.csv"',
        'X-Content-Type-Options': 'nosniff',
      })
      .type('text/csv; charset=utf-8')
      .send(csv);
  });
  routes.guarded(ownerRoutes.getFaultSummary, ({ actor }) => service.faults(actor));
}
