import { accountRoutes } from '../../contract';
import { setSessionCookies, type CookieNames } from '../../platform/http/cookies';
import { deviceOf } from '../../platform/http/device';
import type { Routes } from '../../platform/http/routes';
import type { Invitations } from './invitations-service';
import type { People } from './people-service';

export function registerPeopleRoutes(
  routes: Routes,
  services: { people: People; invitations: Invitations },
  cookies: CookieNames,
): void {
  const { people, invitations } = services;
  routes.guarded(accountRoutes.listPeople, ({ actor }) => people.list(actor));
  routes.guarded(accountRoutes.changePerson, ({ actor, params, body }) =>
    people.change(actor, params.id, body),
  );
  routes.guarded(accountRoutes.recordGuardianConsent, ({ actor, params, body }) =>
    people.recordConsent(actor, params.id, body.guardianName),
  );
  routes.guarded(accountRoutes.invite, ({ actor, body }) => invitations.invite(actor, body));
  routes.guarded(accountRoutes.withdrawInvitation, async ({ actor, params }) => {
    await invitations.withdraw(actor, params.id);
    return undefined;
  });
  routes.open(accountRoutes.getInvitation, ({ params }) => invitations.open(params.token));
  routes.open(accountRoutes.acceptInvitation, async ({ params, body, req, res }) => {
    const { session, tokens } = await invitations.accept(params.token, body, deviceOf(req));
    setSessionCookies(res, cookies, tokens);
    return session;
  });
}
