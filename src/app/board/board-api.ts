import { HttpClient, HttpHeaders } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type {
  AnswerOf,
  BoardDto,
  BodyOf,
  boardRoutes,
  CommentDto,
  DraftAnswer,
  MarkDto,
  MeasureDto,
  ReplyDto,
  TakeDetailDto,
} from '@contract';

export type NewComment = BodyOf<typeof boardRoutes.addComment>;
export type CommentChange = BodyOf<typeof boardRoutes.changeComment>;
export type NewMark = BodyOf<typeof boardRoutes.putMarks>['marks'][number];
export type NewMeasure = BodyOf<typeof boardRoutes.addMeasure>;
export type RepMark = BodyOf<typeof boardRoutes.putRepMarks>['marks'][number];
export type RepMarks = AnswerOf<typeof boardRoutes.putRepMarks>;
export type NewAnswer = BodyOf<typeof boardRoutes.sendAnswer>;

/** A key that makes a repeated POST the same POST. */
function once(): { headers: HttpHeaders } {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  const key = Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
  return { headers: new HttpHeaders({ 'Idempotency-Key': key }) };
}

/** What the board asks of the server. */
@Injectable({ providedIn: 'root' })
export class BoardApi {
  private readonly http = inject(HttpClient);

  board(takeId: string): Observable<BoardDto> {
    return this.http.get<BoardDto>(`/api/takes/${takeId}/board`);
  }

  pickUp(takeId: string): Observable<{ until: string }> {
    return this.http.post<{ until: string }>(`/api/takes/${takeId}/pick-up`, {});
  }

  putBack(takeId: string): Observable<unknown> {
    return this.http.delete(`/api/takes/${takeId}/pick-up`);
  }

  addComment(takeId: string, comment: NewComment): Observable<CommentDto> {
    return this.http.post<CommentDto>(`/api/takes/${takeId}/comments`, comment, once());
  }

  changeComment(commentId: string, change: CommentChange): Observable<CommentDto> {
    return this.http.patch<CommentDto>(`/api/comments/${commentId}`, change);
  }

  deleteComment(commentId: string): Observable<unknown> {
    return this.http.delete(`/api/comments/${commentId}`);
  }

  putMarks(takeId: string, marks: readonly NewMark[]): Observable<{ marks: MarkDto[] }> {
    return this.http.put<{ marks: MarkDto[] }>(`/api/takes/${takeId}/marks`, { marks });
  }

  addMeasure(takeId: string, measure: NewMeasure): Observable<MeasureDto> {
    return this.http.post<MeasureDto>(`/api/takes/${takeId}/measures`, measure, once());
  }

  deleteMeasure(measureId: string): Observable<unknown> {
    return this.http.delete(`/api/measures/${measureId}`);
  }

  putRepMarks(clipId: string, marks: readonly RepMark[]): Observable<RepMarks> {
    return this.http.put<RepMarks>(`/api/clips/${clipId}/rep-marks`, { marks });
  }

  putDraft(takeId: string, draft: DraftAnswer): Observable<DraftAnswer> {
    return this.http.put<DraftAnswer>(`/api/takes/${takeId}/draft`, draft);
  }

  sendAnswer(takeId: string, answer: NewAnswer): Observable<TakeDetailDto> {
    return this.http.post<TakeDetailDto>(`/api/takes/${takeId}/answer`, answer, once());
  }

  reply(takeId: string, body: string): Observable<ReplyDto> {
    return this.http.post<ReplyDto>(`/api/takes/${takeId}/replies`, { body }, once());
  }

  /** The first take of the queue that nobody has, other than this one. */
  nextInQueue(): Observable<{ items: { take: { id: string } }[] }> {
    return this.http.get<{ items: { take: { id: string } }[] }>('/api/queue', {
      params: { only: 'nobody-has-it', limit: 2 },
    });
  }
}
