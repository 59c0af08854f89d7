import type { Request } from 'express';
import { accountRoutes } from '../../contract';
import { notSignedIn } from '../../platform/errors';
import {
  clearSessionCookies,
  readCookie,
  setSessionCookies,
  type CookieNames,
} from '../../platform/http/cookies';
import { deviceOf } from '../../platform/http/device';
import type { Routes } from '../../platform/http/routes';
import type { Sessions } from '../sessions';
import type { Auth, Caller } from './auth-service';

const callerOf = (req: Request): Caller => ({ ip: req.ip ?? 'unknown', device: deviceOf(req) });

export function registerAuthRoutes(
  routes: Routes,
  services: { auth: Auth; sessions: Sessions },
  cookies: CookieNames,
): void {
  const { auth, sessions } = services;
  routes.open(accountRoutes.openGym, async ({ body, req, res }) => {
    const { session, tokens } = await auth.openGym(body, callerOf(req));
    setSessionCookies(res, cookies, tokens);
    return session;
  });
  routes.open(accountRoutes.signIn, async ({ body, req, res }) => {
    const { session, tokens } = await auth.signIn(body, callerOf(req));
    setSessionCookies(res, cookies, tokens);
    return session;
  });
  routes.open(accountRoutes.refresh, async ({ req, res }) => {
    const token = readCookie(req, cookies.refresh);
    if (!token) throw notSignedIn();
    setSessionCookies(res, cookies, await sessions.refresh(token));
    return undefined;
  });
  routes.open(accountRoutes.signOut, async ({ req, res }) => {
    const token = readCookie(req, cookies.refresh);
    if (token) await sessions.endByRefreshToken(token);
    clearSessionCookies(res, cookies);
    return undefined;
  });
  routes.open(accountRoutes.forgotPassword, async ({ body, req }) => {
    await auth.forgot(body.email, callerOf(req));
    return undefined;
  });
  routes.open(accountRoutes.resetPassword, async ({ body, req }) => {
    await auth.reset(body.token, body.password, callerOf(req));
    return undefined;
  });
  routes.guarded(accountRoutes.getMe, ({ actor }) => auth.me(actor));
  routes.guarded(accountRoutes.changeMe, ({ actor, body }) => auth.changeMe(actor, body));
  routes.guarded(accountRoutes.listSessions, async ({ actor }) => ({ items: await sessions.list(actor) }));
  routes.guarded(accountRoutes.endSession, async ({ actor, params }) => {
    await sessions.end(actor, params.id);
    return undefined;
  });
}
