import { HttpErrorResponse } from '@angular/common/http';
import type { Problem } from '@contract';

export type { Problem } from '@contract';

const OFFLINE: Problem = {
  type: 'about:blank',
  title: 'No connection',
  status: 0,
  detail: 'The server cannot be reached. Check the network and try again; nothing has been lost.',
};

function isProblem(body: unknown): body is Problem {
  return (
    typeof body === 'object' &&
    body !== null &&
    'title' in body &&
    typeof body.title === 'string' &&
    'status' in body &&
    typeof body.status === 'number'
  );
}

/**
 * What went wrong, in the API's own shape (RFC 9457), whatever was thrown.
 * A request that never reached the server has status 0; anything that is no answer of the API gets plain words.
 */
export function problemOf(error: unknown): Problem {
  if (error instanceof HttpErrorResponse) {
    if (error.status === 0) return OFFLINE;
    if (isProblem(error.error)) return error.error;
    return {
      type: 'about:blank',
      title: 'The server could not do that',
      status: error.status,
      detail: 'Please try again in a moment. If it keeps happening, tell the owner of your gym.',
    };
  }
  return {
    type: 'about:blank',
    title: 'Something went wrong',
    status: -1,
    detail: 'Please try again. If it keeps happening, load the page again.',
  };
}
