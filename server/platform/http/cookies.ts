import type { CookieOptions, Request, Response } from 'express';

export interface CookieNames {
  readonly access: string;
  readonly refresh: string;
  readonly secure: boolean;
}

/** Cookie names; over HTTPS with the `__Host-` prefix, which pins them to this host and path. */
export function cookieNames(secure: boolean): CookieNames {
  const prefix = secure ? '__Host-' : '';
  return { access: `${prefix}mf_access`, refresh: `${prefix}mf_refresh`, secure };
}

/** The pair that Angular's HTTP client expects. */
export const XSRF_COOKIE = 'XSRF-TOKEN';
export const XSRF_HEADER = 'x-xsrf-token';

const options = (secure: boolean, maxAge: number): CookieOptions => ({
  httpOnly: true,
  sameSite: 'lax',
  secure,
  path: '/',
  maxAge,
});

export interface SessionTokens {
  readonly access: string;
  readonly accessMs: number;
  readonly refresh: string;
  readonly refreshMs: number;
}

export function setSessionCookies(res: Response, names: CookieNames, tokens: SessionTokens): void {
  res.cookie(names.access, tokens.access, options(names.secure, tokens.accessMs));
  res.cookie(names.refresh, tokens.refresh, options(names.secure, tokens.refreshMs));
}

export function clearSessionCookies(res: Response, names: CookieNames): void {
  // Browsers take a `__Host-` cookie, an expired one too, only with the attributes it was set with.
  for (const name of [names.access, names.refresh]) {
    const { maxAge: _, ...attributes } = options(names.secure, 0);
    res.clearCookie(name, attributes);
  }
}

/** One cookie's value, or null. */
export function readCookie(req: Request, name: string): string | null {
  const jar: unknown = req.cookies;
  if (typeof jar !== 'object' || jar === null || !(name in jar)) return null;
  const value: unknown = (jar as Record<string, unknown>)[name];
  return typeof value === 'string' && value !== '' ? value : null;
}
