import { HttpClient, HttpParams } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type {
  AssignmentDetailDto,
  AssignmentDto,
  BodyOf,
  libraryRoutes,
  LiftDto,
  Page,
  UserDto,
} from '@contract';

/** An assignment as it is sent to be made. */
export type NewAssignmentBody = BodyOf<typeof libraryRoutes.createAssignment>;

@Injectable({ providedIn: 'root' })
export class AssignmentsApi {
  private readonly http = inject(HttpClient);

  assignments(limit: number, cursor?: string): Observable<Page<AssignmentDto>> {
    let params = new HttpParams().set('limit', limit);
    if (cursor !== undefined) params = params.set('cursor', cursor);
    return this.http.get<Page<AssignmentDto>>('/api/assignments', { params });
  }

  assignment(id: string): Observable<AssignmentDetailDto> {
    return this.http.get<AssignmentDetailDto>(`/api/assignments/${id}`);
  }

  /** @param key the same for every try to make this assignment, so that a lost answer does not make it twice */
  add(assignment: NewAssignmentBody, key: string): Observable<AssignmentDto> {
    return this.http.post<AssignmentDto>('/api/assignments', assignment, {
      headers: { 'Idempotency-Key': key },
    });
  }

  close(id: string): Observable<AssignmentDto> {
    return this.http.post<AssignmentDto>(`/api/assignments/${id}/close`, {});
  }

  reopen(id: string): Observable<AssignmentDto> {
    return this.http.post<AssignmentDto>(`/api/assignments/${id}/reopen`, {});
  }

  lifts(): Observable<{ items: LiftDto[] }> {
    return this.http.get<{ items: LiftDto[] }>('/api/lifts');
  }

  people(): Observable<{ items: UserDto[] }> {
    return this.http.get<{ items: UserDto[] }>('/api/people');
  }
}
