import { HttpClient, HttpParams } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { LiftDto, TurnaroundDto, UserDto } from '@contract';
import type { TurnaroundFilter } from './turnaround-filter';

export const CSV_URL = '/api/turnaround.csv';

/** The filter as the API's query; a part that is not chosen is left out. */
export function queryOf(filter: TurnaroundFilter): HttpParams {
  const { from, to, coachId, liftId, clock } = filter;
  let params = new HttpParams().set('clock', clock);
  for (const [name, value] of Object.entries({ from, to, coachId, liftId })) {
    if (value !== null) params = params.set(name, value);
  }
  return params;
}

@Injectable({ providedIn: 'root' })
export class TurnaroundApi {
  private readonly http = inject(HttpClient);

  figures(filter: TurnaroundFilter): Observable<TurnaroundDto> {
    return this.http.get<TurnaroundDto>('/api/turnaround', { params: queryOf(filter) });
  }

  people(): Observable<{ items: UserDto[] }> {
    return this.http.get<{ items: UserDto[] }>('/api/people');
  }

  lifts(): Observable<{ items: LiftDto[] }> {
    return this.http.get<{ items: LiftDto[] }>('/api/lifts');
  }
}
