import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { defer, finalize, shareReplay, type Observable } from 'rxjs';

/** Renews the session, once however many requests found it lapsed at the same time. */
@Injectable({ providedIn: 'root' })
export class SessionRefresh {
  private readonly http = inject(HttpClient);
  private underWay: Observable<unknown> | null = null;

  refresh(): Observable<unknown> {
    this.underWay ??= defer(() => this.http.post('/api/auth/refresh', {})).pipe(
      finalize(() => (this.underWay = null)),
      shareReplay({ bufferSize: 1, refCount: false }),
    );
    return this.underWay;
  }
}
