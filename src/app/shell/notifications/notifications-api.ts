import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { NotificationsDto } from '@contract';

@Injectable({ providedIn: 'root' })
export class NotificationsApi {
  private readonly http = inject(HttpClient);

  list(): Observable<NotificationsDto> {
    return this.http.get<NotificationsDto>('/api/notifications');
  }

  /** Marks the named notices read; all of them when none is named. */
  markRead(ids?: readonly string[]): Observable<unknown> {
    return this.http.post('/api/notifications/read', ids ? { ids } : {});
  }
}
