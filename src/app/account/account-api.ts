import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { accountRoutes, AnswerOf, BodyOf, SessionDto } from '@contract';

export type MeChangeBody = BodyOf<typeof accountRoutes.changeMe>;
/** One place where I am signed in. */
export type SignedInPlace = AnswerOf<typeof accountRoutes.listSessions>['items'][number];

export const EXPORT_URL = '/api/me/export';

@Injectable({ providedIn: 'root' })
export class AccountApi {
  private readonly http = inject(HttpClient);

  change(change: MeChangeBody): Observable<SessionDto> {
    return this.http.patch<SessionDto>('/api/me', change);
  }

  places(): Observable<{ items: SignedInPlace[] }> {
    return this.http.get<{ items: SignedInPlace[] }>('/api/me/sessions');
  }

  endPlace(id: string): Observable<unknown> {
    return this.http.delete(`/api/me/sessions/${id}`);
  }

  erase(password: string): Observable<unknown> {
    return this.http.delete('/api/me', { body: { password } });
  }
}
