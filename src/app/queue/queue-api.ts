import { HttpClient, HttpParams } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { LiftDto, Page, QueueItemDto, TakeDto } from '@contract';

/** Which part of the queue to show; null for all of it. */
export type QueueOnly = 'needed-today' | 'second-takes' | 'nobody-has-it';

/** What the queue is narrowed to. */
export interface QueueFilter {
  readonly only: QueueOnly | null;
  readonly liftId: string | null;
}

/** One page of the queue, with counts of the whole of it. */
export interface QueuePageDto {
  items: QueueItemDto[];
  next: string | null;
  waiting: number;
  hurting: number;
  unplayable: number;
}

@Injectable({ providedIn: 'root' })
export class QueueApi {
  private readonly http = inject(HttpClient);

  queue(filter: QueueFilter, limit: number, cursor?: string): Observable<QueuePageDto> {
    let params = new HttpParams().set('limit', limit);
    if (filter.only) params = params.set('only', filter.only);
    if (filter.liftId) params = params.set('liftId', filter.liftId);
    if (cursor !== undefined) params = params.set('cursor', cursor);
    return this.http.get<QueuePageDto>('/api/queue', { params });
  }

  lifts(): Observable<{ items: LiftDto[] }> {
    return this.http.get<{ items: LiftDto[] }>('/api/lifts');
  }

  unplayable(): Observable<Page<TakeDto>> {
    return this.http.get<Page<TakeDto>>('/api/takes', { params: { state: 'unplayable', limit: 100 } });
  }

  retry(takeId: string): Observable<TakeDto> {
    return this.http.post<TakeDto>(`/api/takes/${takeId}/retry`, {});
  }
}
