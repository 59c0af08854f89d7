import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { LiftDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { LiftsApi } from './lifts-api';

const GATHER_MS = 250;

/** One lift, kept true by events. Provided by the page. */
@Injectable()
export class LiftStore {
  private readonly api = inject(LiftsApi);
  private liftId: string | null = null;
  private fetches = 0;

  readonly lift = signal<LiftDto | null>(null);
  readonly problem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    merge(live.of('lifts.changed'), live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
  }

  async open(liftId: string): Promise<void> {
    this.liftId = liftId;
    this.lift.set(null);
    await this.refresh();
  }

  async refresh(): Promise<void> {
    const { liftId } = this;
    if (liftId === null) return;
    const fetch = ++this.fetches;
    try {
      const lift = await firstValueFrom(this.api.lift(liftId));
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.lift.set(lift);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }

  /**
   * Takes the lift off the list, or puts it back.
   * @returns whether it was done; if not, `problem` says why
   */
  async setArchived(archived: boolean): Promise<boolean> {
    const { liftId } = this;
    if (liftId === null) return false;
    try {
      const changed = await firstValueFrom(this.api.change(liftId, { archived }));
      this.lift.update((lift) => (lift?.id === liftId ? changed : lift));
      this.problem.set(null);
      return true;
    } catch (error) {
      this.problem.set(problemOf(error));
      return false;
    }
  }
}
