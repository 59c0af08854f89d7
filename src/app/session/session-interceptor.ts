import {
  HttpClient,
  HttpErrorResponse,
  HttpXsrfTokenExtractor,
  type HttpHandlerFn,
  type HttpInterceptorFn,
  type HttpRequest,
} from '@angular/common/http';
import { inject, Injector } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, switchMap, throwError } from 'rxjs';
import { LEAVES_PAGE_ALONE } from './session-context';
import { SessionRefresh } from './session-refresh';
import { SessionStore } from './session-store';
import { signInTree } from './sign-in-tree';

const XSRF_HEADER = 'X-XSRF-TOKEN';

/** Doors that are open to anyone: a 401 there is an answer about what was typed, not about the session. */
const OPEN_DOORS = /^\/api\/(auth\/|gyms$|invitations\/[^/]+(\/accept)?$|dev\/|health$)/;

function isOurs(request: HttpRequest<unknown>): boolean {
  return request.url.startsWith('/api/') && !OPEN_DOORS.test(request.url);
}

function isSignedOut(error: unknown): boolean {
  return error instanceof HttpErrorResponse && error.status === 401;
}

/**
 * When the server no longer knows the session: renews it once and sends the request again; if that fails too, goes to
 * the sign-in page, which leads back to the place that was left.
 */
export const sessionInterceptor: HttpInterceptorFn = (request, next) => {
  if (!isOurs(request)) return next(request);
  const injector = inject(Injector);
  return next(request).pipe(
    catchError((error: unknown) => {
      if (!isSignedOut(error)) return throwError(() => error);
      return injector
        .get(SessionRefresh)
        .refresh()
        .pipe(
          // Only a refusal ends the session; a lost network leaves it be.
          catchError((refusal: unknown) => throwError(() => (isSignedOut(refusal) ? error : refusal))),
          switchMap(() => next(request)),
          catchError((last: unknown) => {
            if (isSignedOut(last) && !request.context.get(LEAVES_PAGE_ALONE)) leave(injector);
            return throwError(() => last);
          }),
        );
    }),
  );
};

function leave(injector: Injector): void {
  const store = injector.get(SessionStore);
  const router = injector.get(Router);
  if (store.status() !== 'signed-in') return;
  store.end();
  void router.navigateByUrl(signInTree(router, router.url));
}

/**
 * Sees that a request that changes something carries the cross-site token: Angular adds the header from the cookie, but
 * a browser that has just arrived has no cookie yet. Any GET brings it.
 */
export const crossSiteTokenInterceptor: HttpInterceptorFn = (request, next) => {
  const changes = request.url.startsWith('/api/') && !['GET', 'HEAD', 'OPTIONS'].includes(request.method);
  const extractor = inject(HttpXsrfTokenExtractor);
  if (!changes || request.headers.has(XSRF_HEADER)) return next(request);
  const token = extractor.getToken();
  if (token !== null) return next(withToken(request, token));
  return fetchThenSend(request, next, inject(HttpClient), extractor);
};

function fetchThenSend(
  request: HttpRequest<unknown>,
  next: HttpHandlerFn,
  http: HttpClient,
  extractor: HttpXsrfTokenExtractor,
) {
  return http.get('/api/health').pipe(
    // An unhealthy server still hands out the cookie with its answer.
    catchError(() => [null]),
    switchMap(() => {
      const token = extractor.getToken();
      return next(token === null ? request : withToken(request, token));
    }),
  );
}

function withToken(request: HttpRequest<unknown>, token: string): HttpRequest<unknown> {
  return request.clone({ headers: request.headers.set(XSRF_HEADER, token) });
}
