import { inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { problemOf, type Problem } from '../shared/problems/problem';
import { AccountApi, type SignedInPlace } from './account-api';

/** Where I am signed in; this browser first, then the last used. Provided by the page. */
@Injectable()
export class PlacesStore {
  private readonly api = inject(AccountApi);

  /** Null until they are here. */
  readonly places = signal<readonly SignedInPlace[] | null>(null);
  readonly problem = signal<Problem | null>(null);
  readonly endingId = signal<string | null>(null);

  constructor() {
    void this.refresh();
  }

  async refresh(): Promise<void> {
    try {
      const { items } = await firstValueFrom(this.api.places());
      this.places.set(
        [...items].sort(
          (a, b) => Number(b.current) - Number(a.current) || b.lastUsedAt.localeCompare(a.lastUsedAt),
        ),
      );
      this.problem.set(null);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** @returns whether it was ended; if not, `problem` says why */
  async end(id: string): Promise<boolean> {
    this.endingId.set(id);
    try {
      await firstValueFrom(this.api.endPlace(id));
      this.places.update((places) => places?.filter((place) => place.id !== id) ?? null);
      this.problem.set(null);
      return true;
    } catch (error) {
      this.problem.set(problemOf(error));
      return false;
    } finally {
      this.endingId.set(null);
    }
  }
}
