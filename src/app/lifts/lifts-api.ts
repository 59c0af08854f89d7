import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { BodyOf, LiftDto, libraryRoutes } from '@contract';

/** A lift as it is sent to be added. */
export type NewLiftBody = BodyOf<typeof libraryRoutes.createLift>;
/** What of a lift is to change. */
export type LiftChangeBody = BodyOf<typeof libraryRoutes.changeLift>;

@Injectable({ providedIn: 'root' })
export class LiftsApi {
  private readonly http = inject(HttpClient);

  lifts(): Observable<{ items: LiftDto[] }> {
    return this.http.get<{ items: LiftDto[] }>('/api/lifts');
  }

  lift(id: string): Observable<LiftDto> {
    return this.http.get<LiftDto>(`/api/lifts/${id}`);
  }

  /** @param key the same for every try to add this lift, so that a lost answer does not add it twice */
  add(lift: NewLiftBody, key: string): Observable<LiftDto> {
    return this.http.post<LiftDto>('/api/lifts', lift, { headers: { 'Idempotency-Key': key } });
  }

  change(id: string, change: LiftChangeBody): Observable<LiftDto> {
    return this.http.patch<LiftDto>(`/api/lifts/${id}`, change);
  }
}
