import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { LiftDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { LiftsApi } from './lifts-api';

const GATHER_MS = 250;

/** The gym's library, kept true by events. Provided by the page. */
@Injectable()
export class LiftsStore {
  private readonly api = inject(LiftsApi);
  private fetches = 0;

  /** Null until they are here. */
  readonly lifts = signal<readonly LiftDto[] | null>(null);
  readonly problem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    merge(live.of('lifts.changed'), live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.load());
    void this.load();
  }

  async load(): Promise<void> {
    const fetch = ++this.fetches;
    try {
      const { items } = await firstValueFrom(this.api.lifts());
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.lifts.set(items);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }
}
