import { takeRoutes } from '../../contract';
import type { Routes } from '../../platform/http/routes';
import type { ClipsService } from './clips-service';

export function registerClipsRoutes(routes: Routes, service: ClipsService): void {
  routes.guarded(takeRoutes.uploadClip, ({ actor, params, req, res }) =>
    service.upload(actor, params.id, params.view, req, res),
  );
  routes.guarded(takeRoutes.removeClip, async ({ actor, params }) => {
    await service.remove(actor, params.id);
    return undefined;
  });
  routes.guarded(takeRoutes.changeClip, ({ actor, params, body }) =>
    service.trim(actor, params.id, body.trim),
  );
  routes.stream(takeRoutes.getClipMedia, ({ actor, params, req, res }) =>
    service.sendMedia(actor, params.id, params.kind, req, res),
  );
  routes.stream(takeRoutes.getClipThumbnail, ({ actor, params, req, res }) =>
    service.sendThumbnail(actor, params.id, params.n, req, res),
  );
}
