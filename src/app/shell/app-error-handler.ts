import { inject, Injectable, Injector, type ErrorHandler } from '@angular/core';
import { HttpErrorResponse } from '@angular/common/http';
import { problemOf } from '../shared/problems/problem';
import { Snackbar } from '../shared/snackbar/snackbar';

/** The last resort for what no page caught: says so to the person and leaves the facts in the browser's console. */
@Injectable()
export class AppErrorHandler implements ErrorHandler {
  private readonly injector = inject(Injector);

  handleError(error: unknown): void {
    // The console is where a developer looks; nothing of it is sent anywhere.
    // eslint-disable-next-line no-console
    console.error(error);
    if (error instanceof HttpErrorResponse && error.status === 401) return;
    this.injector.get(Snackbar).say(problemOf(error instanceof Error ? error : unwrap(error)).detail);
  }
}

/** A rejected promise arrives wrapped; what it was rejected with is the error. */
function unwrap(error: unknown): unknown {
  return typeof error === 'object' && error !== null && 'rejection' in error ? error.rejection : error;
}
