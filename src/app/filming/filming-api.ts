import { HttpClient, type HttpEvent } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { AssignmentDto, ClipDto, TakeDetailDto, TakeDto, View, BodyOf, takeRoutes } from '@contract';

/** What a member says about a take; a field left out stays as it is, null empties it. */
export type Words = BodyOf<typeof takeRoutes.changeTake>;

/** Filming's part of the API. */
@Injectable({ providedIn: 'root' })
export class FilmingApi {
  private readonly http = inject(HttpClient);

  assignment(assignmentId: string): Observable<AssignmentDto> {
    return this.http.get<AssignmentDto>(`/api/assignments/${encodeURIComponent(assignmentId)}`);
  }

  take(takeId: string): Observable<TakeDetailDto> {
    return this.http.get<TakeDetailDto>(`/api/takes/${encodeURIComponent(takeId)}`);
  }

  /** Begins a take, or answers with the draft that is open already. */
  begin(assignmentId: string, words: Words, key: string): Observable<TakeDto> {
    const url = `/api/assignments/${encodeURIComponent(assignmentId)}/takes`;
    return this.http.post<TakeDto>(url, words, { headers: { 'Idempotency-Key': key } });
  }

  change(takeId: string, words: Words): Observable<TakeDto> {
    return this.http.patch<TakeDto>(`/api/takes/${encodeURIComponent(takeId)}`, words);
  }

  /** Sends a clip, telling how far it is. The same key for the same file makes sending it twice harmless. */
  send(takeId: string, view: View, file: File, key: string): Observable<HttpEvent<ClipDto>> {
    const body = new FormData();
    body.append('file', file, file.name);
    return this.http.post<ClipDto>(`/api/takes/${encodeURIComponent(takeId)}/clips/${view}`, body, {
      headers: { 'Idempotency-Key': key },
      reportProgress: true,
      observe: 'events',
    });
  }

  remove(clipId: string): Observable<unknown> {
    return this.http.delete(`/api/clips/${encodeURIComponent(clipId)}`);
  }

  submit(takeId: string): Observable<TakeDto> {
    return this.http.post<TakeDto>(`/api/takes/${encodeURIComponent(takeId)}/submit`, {});
  }

  withdraw(takeId: string): Observable<TakeDto> {
    return this.http.post<TakeDto>(`/api/takes/${encodeURIComponent(takeId)}/withdraw`, {});
  }

  retry(takeId: string): Observable<TakeDto> {
    return this.http.post<TakeDto>(`/api/takes/${encodeURIComponent(takeId)}/retry`, {});
  }
}
