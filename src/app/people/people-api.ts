import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { accountRoutes, BodyOf, InvitationDto, UserDto } from '@contract';

/** Everyone of the gym, and who has been invited but has not come in yet. */
export interface People {
  items: UserDto[];
  invitations: InvitationDto[];
}

export type NewInvitationBody = BodyOf<typeof accountRoutes.invite>;
export type PersonChangeBody = BodyOf<typeof accountRoutes.changePerson>;

@Injectable({ providedIn: 'root' })
export class PeopleApi {
  private readonly http = inject(HttpClient);

  people(): Observable<People> {
    return this.http.get<People>('/api/people');
  }

  change(id: string, change: PersonChangeBody): Observable<UserDto> {
    return this.http.patch<UserDto>(`/api/people/${id}`, change);
  }

  /** @param key the same for every try to record this consent */
  recordConsent(id: string, guardianName: string, key: string): Observable<UserDto> {
    return this.http.post<UserDto>(
      `/api/people/${id}/guardian-consent`,
      { guardianName },
      { headers: { 'Idempotency-Key': key } },
    );
  }

  /**
   * Invites by mail; an open invitation to the same address is replaced.
   * @param key the same for every try to send this invitation, so that a lost answer does not send it twice
   */
  invite(invitation: NewInvitationBody, key: string): Observable<InvitationDto> {
    return this.http.post<InvitationDto>('/api/invitations', invitation, {
      headers: { 'Idempotency-Key': key },
    });
  }

  withdraw(invitationId: string): Observable<unknown> {
    return this.http.delete(`/api/invitations/${invitationId}`);
  }
}
