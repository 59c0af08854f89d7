import type {} from 'pino-http';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Problem } from '../../contract/common';
import { AppError, notFound } from '../errors';
import type { Logger } from '../logging';

const TITLES: Record<number, string> = {
  400: 'Not understood',
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not here',
  408: 'Timed out',
  409: 'Not now',
  413: 'Too large',
  415: 'Wrong kind of file',
  422: 'Refused',
  429: 'Too many',
  503: 'Not available',
};

/** Problem details of an error that is meant for the caller. */
export function problemOf(error: AppError): Problem {
  return {
    type: `urn:midfoot:problem:${error.code}`,
    title: TITLES[error.status] ?? 'Something went wrong',
    status: error.status,
    detail: error.message,
    ...(error.extra.errors ? { errors: error.extra.errors.map((entry) => ({ ...entry })) } : {}),
    ...error.extra.members,
  };
}

export const unknownRoute: RequestHandler = (_req, _res, next) => {
  next(notFound());
};

const UNREACHABLE = new Set(['ECONNREFUSED', 'ECONNRESET', 'PROTOCOL_CONNECTION_LOST', 'ETIMEDOUT', 'EPIPE']);

function isUnreachable(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  if ('code' in error && typeof error.code === 'string' && UNREACHABLE.has(error.code)) return true;
  return error.name === 'KnexTimeoutError' || error.name === 'TimeoutError' || isUnreachable(error.cause);
}

/** Errors of Express's own parsers carry a status and say whether their text may be shown. */
function fromParser(error: unknown): AppError | null {
  if (!(error instanceof Error) || !('status' in error) || typeof error.status !== 'number') return null;
  if (error.status === 413)
    return new AppError(413, 'too-large', 'That is more than this address takes. Send less.');
  if (error.status >= 400 && error.status < 500)
    return new AppError(400, 'malformed', 'The body could not be read. Send well-formed JSON.');
  return null;
}

/** The one place where errors become answers. What is not meant for the caller is logged and told without details. */
export function problemHandler(logger: Logger): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    let told = error instanceof AppError ? error : fromParser(error);
    if (!told) {
      if (isUnreachable(error)) {
        logger.warn({ err: error, requestId: req.id }, 'a part of the service does not answer');
        told = new AppError(
          503,
          'unavailable',
          'A part of the service does not answer just now. Nothing was lost; try again in a moment.',
          { headers: { 'Retry-After': '5' } },
        );
      } else {
        logger.error({ err: error, requestId: req.id }, 'a request failed');
        told = new AppError(
          500,
          'internal',
          'Something went wrong on our side. Try again; if it stays, tell your gym’s owner.',
        );
      }
    }
    if (res.headersSent) {
      next(error);
      return;
    }
    for (const [name, value] of Object.entries(told.extra.headers ?? {})) res.setHeader(name, value);
    res
      .status(told.status)
      .type('application/problem+json')
      .send(JSON.stringify(problemOf(told)));
  };
}
