import { HttpClient, HttpContext } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { catchError, of, throwError, type Observable } from 'rxjs';
import type { DemoDto, InvitationDto, SessionDto } from '@contract';
import { problemOf } from '../shared/problems/problem';
import { LEAVES_PAGE_ALONE } from './session-context';

/** What opens a gym: the gym's name and zone, and its owner's account. */
export interface GymOpening {
  gymName: string;
  timeZone: string;
  name: string;
  email: string;
  password: string;
}

/** One of the demo's people. */
export type DemoAccount = DemoDto['accounts'][number];

/** The session's part of the API. */
@Injectable({ providedIn: 'root' })
export class SessionApi {
  private readonly http = inject(HttpClient);

  me(): Observable<SessionDto> {
    // Whoever asks decides what a signed-out answer means, so the page is left where it is.
    const context = new HttpContext().set(LEAVES_PAGE_ALONE, true);
    return this.http.get<SessionDto>('/api/me', { context });
  }

  /** As `me`, where a signed-out answer means that the session has ended. */
  stillMe(): Observable<SessionDto> {
    return this.http.get<SessionDto>('/api/me');
  }

  signIn(email: string, password: string): Observable<SessionDto> {
    return this.http.post<SessionDto>('/api/auth/sign-in', { email, password });
  }

  signOut(): Observable<unknown> {
    return this.http.post('/api/auth/sign-out', {});
  }

  openGym(opening: GymOpening): Observable<SessionDto> {
    return this.http.post<SessionDto>('/api/gyms', opening);
  }

  forgot(email: string): Observable<unknown> {
    return this.http.post('/api/auth/forgot', { email });
  }

  reset(token: string, password: string): Observable<unknown> {
    return this.http.post('/api/auth/reset', { token, password });
  }

  invitation(token: string): Observable<InvitationDto> {
    return this.http.get<InvitationDto>(`/api/invitations/${encodeURIComponent(token)}`);
  }

  accept(token: string, password: string, bornOn: string | undefined): Observable<SessionDto> {
    const url = `/api/invitations/${encodeURIComponent(token)}/accept`;
    return this.http.post<SessionDto>(url, { password, bornOn });
  }

  /** The demo's accounts; none where this is no demo. */
  demoAccounts(): Observable<DemoDto> {
    return this.http
      .get<DemoDto>('/api/dev/demo')
      .pipe(
        catchError((error: unknown) =>
          problemOf(error).status === 404 ? of({ accounts: [] }) : throwError(() => error),
        ),
      );
  }
}
