import { accountRoutes } from '../../contract';
import { clearSessionCookies, type CookieNames } from '../../platform/http/cookies';
import type { Routes } from '../../platform/http/routes';
import type { Erasure } from './erasure-service';
import type { Exports } from './export-service';

export interface Privacy {
  readonly exports: Exports;
  readonly erasure: Erasure;
}

export function registerPrivacyRoutes(routes: Routes, privacy: Privacy, cookies: CookieNames): void {
  routes.stream(accountRoutes.exportMe, ({ actor, res }) => privacy.exports.send(actor, res));
  routes.guarded(accountRoutes.eraseMe, async ({ actor, body, res }) => {
    await privacy.erasure.erase(actor, body.password);
    clearSessionCookies(res, cookies);
    return undefined;
  });
}
