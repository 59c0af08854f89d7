import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { ProgressDto } from '@contract';

/** Progress's part of the API. */
@Injectable({ providedIn: 'root' })
export class ProgressApi {
  private readonly http = inject(HttpClient);

  /** A member's takes and faults per lift; mine when no member is named. */
  progress(memberId: string | undefined): Observable<ProgressDto> {
    return this.http.get<ProgressDto>('/api/progress', { params: memberId ? { memberId } : {} });
  }
}
