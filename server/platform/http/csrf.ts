import type { RequestHandler } from 'express';
import { timingSafeEqual } from 'node:crypto';
import { AppError } from '../errors';
import { newSecret } from '../ids';
import { XSRF_COOKIE, XSRF_HEADER, readCookie } from './cookies';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Cross-site protection: the double-submit pair that Angular's HTTP client sends, and a look at where the browser
 * says the call comes from. Any safe call under `/api` sets the cookie when it is missing.
 */
export function crossSiteProtection(secure: boolean): RequestHandler {
  return (req, res, next) => {
    const cookie = readCookie(req, XSRF_COOKIE);
    if (SAFE.has(req.method)) {
      if (!cookie) res.cookie(XSRF_COOKIE, newSecret(), { sameSite: 'lax', secure, path: '/' });
      next();
      return;
    }
    const header = req.get(XSRF_HEADER);
    const matches =
      cookie !== null &&
      header !== undefined &&
      header.length === cookie.length &&
      timingSafeEqual(Buffer.from(header), Buffer.from(cookie));
    if (!matches || req.get('sec-fetch-site') === 'cross-site') {
      next(
        new AppError(
          403,
          'cross-site',
          'This call did not carry the page’s own token. Reload the page and try again.',
        ),
      );
      return;
    }
    next();
  };
}
