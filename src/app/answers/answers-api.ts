import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { Page, ReplyDto, TakeDetailDto, TakeDto, View } from '@contract';

/** The answers' part of the API. */
@Injectable({ providedIn: 'root' })
export class AnswersApi {
  private readonly http = inject(HttpClient);

  /** My takes, newest first, drafts among them. */
  takes(cursor: string | null): Observable<Page<TakeDto>> {
    return this.http.get<Page<TakeDto>>('/api/takes', {
      params: { limit: 50, ...(cursor ? { cursor } : {}) },
    });
  }

  take(takeId: string): Observable<TakeDetailDto> {
    return this.http.get<TakeDetailDto>(addressOf(takeId));
  }

  markRead(takeId: string): Observable<unknown> {
    return this.http.post(`${addressOf(takeId)}/read`, {});
  }

  reply(takeId: string, body: string, key: string): Observable<ReplyDto> {
    return this.http.post<ReplyDto>(
      `${addressOf(takeId)}/replies`,
      { body },
      { headers: { 'Idempotency-Key': key } },
    );
  }

  withdraw(takeId: string): Observable<TakeDto> {
    return this.http.post<TakeDto>(`${addressOf(takeId)}/withdraw`, {});
  }

  /** Begins the next take of an assignment; its views are those of the last answer's request. */
  filmAgain(assignmentId: string, key: string): Observable<TakeDto> {
    const url = `/api/assignments/${encodeURIComponent(assignmentId)}/takes`;
    return this.http.post<TakeDto>(url, {}, { headers: { 'Idempotency-Key': key } });
  }

  /** Address of the comments on one view as captions. */
  captions(takeId: string, view: View): string {
    return `${addressOf(takeId)}/comments.vtt?view=${view}`;
  }
}

function addressOf(takeId: string): string {
  return `/api/takes/${encodeURIComponent(takeId)}`;
}
