import { inject } from '@angular/core';
import { Router, type CanActivateFn } from '@angular/router';
import type { Role } from '@contract';
import { SessionStore } from './session-store';
import { signInTree } from './sign-in-tree';

/** Lets signed-in people of any role in; others sign in first and are brought back. */
export const signedInGuard: CanActivateFn = async (_route, state) => {
  const store = inject(SessionStore);
  const router = inject(Router);
  return (await store.load()) === 'signed-in' || signInTree(router, state.url);
};

/** Lets only the named roles in; signed-in people of another role go to their own first room. */
export function roleGuard(...roles: readonly Role[]): CanActivateFn {
  return async (_route, state) => {
    const store = inject(SessionStore);
    const router = inject(Router);
    if ((await store.load()) !== 'signed-in') return signInTree(router, state.url);
    const role = store.role();
    return (role !== null && roles.includes(role)) || router.parseUrl(store.home());
  };
}

/** Keeps signed-in people off the sign-in page. Asks the server only where somebody was signed in before. */
export const signedOutGuard: CanActivateFn = async () => {
  const store = inject(SessionStore);
  const router = inject(Router);
  if (!store.hasHint() && store.status() !== 'signed-in') return true;
  return (await store.load()) !== 'signed-in' || router.parseUrl(store.home());
};
