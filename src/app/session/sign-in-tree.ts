import type { Router, UrlTree } from '@angular/router';

/** The sign-in page's address, remembering the place to come back to (a path of this application). */
export function signInTree(router: Router, place: string): UrlTree {
  const queryParams = place === '' || place === '/' ? {} : { return: place };
  return router.createUrlTree(['/sign-in'], { queryParams });
}

/** Whether a `return` value is a path of this application and not an address elsewhere (`//host`, `/\host`). */
export function isOwnPath(place: string | undefined): place is string {
  return place !== undefined && /^\/(?![/\\])/.test(place) && !place.startsWith('/sign-in');
}
