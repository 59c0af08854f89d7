import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { AssignmentDto, Page, TakeDetailDto, TakeDto } from '@contract';

/** What Today asks of the API. */
@Injectable({ providedIn: 'root' })
export class TodayApi {
  private readonly http = inject(HttpClient);

  /** My assignments, newest first, each with my takes. */
  assignments(): Observable<Page<AssignmentDto>> {
    return this.http.get<Page<AssignmentDto>>('/api/assignments', { params: { limit: 100 } });
  }

  /** My answered takes that I have not opened, newest first. */
  unread(): Observable<Page<TakeDto>> {
    return this.http.get<Page<TakeDto>>('/api/takes', {
      params: { state: 'answered', unread: 'true', limit: 20 },
    });
  }

  take(takeId: string): Observable<TakeDetailDto> {
    return this.http.get<TakeDetailDto>(`/api/takes/${encodeURIComponent(takeId)}`);
  }
}
