import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { GymChange, GymDto } from '@contract';

@Injectable({ providedIn: 'root' })
export class GymApi {
  private readonly http = inject(HttpClient);

  gym(): Observable<GymDto> {
    return this.http.get<GymDto>('/api/gym');
  }

  change(change: GymChange): Observable<GymDto> {
    return this.http.patch<GymDto>('/api/gym', change);
  }
}
