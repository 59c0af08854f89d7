import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { Person, TurnaroundDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { TurnaroundApi } from './turnaround-api';
import type { TurnaroundFilter } from './turnaround-filter';

/** Figures need not be true to the second; a busy evening must not fetch them at every take. */
const GATHER_MS = 2_000;

/** The figures for the filter, kept true by events, and what can be filtered by. Provided by the page. */
@Injectable()
export class TurnaroundStore {
  private readonly api = inject(TurnaroundApi);
  private filter: TurnaroundFilter | null = null;
  private fetches = 0;

  /** Null until they are here; those of the filter before stay until the next are. */
  readonly figures = signal<TurnaroundDto | null>(null);
  readonly problem = signal<Problem | null>(null);
  readonly isFetching = signal(false);
  readonly coaches = signal<readonly Person[]>([]);
  readonly lifts = signal<readonly Person[]>([]);
  /** Why coaches and lifts cannot be chosen. */
  readonly choicesProblem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    const changes = live.of(
      'take.submitted',
      'take.answered',
      'take.withdrawn',
      'take.unplayable',
      'take.retried',
      'gym.changed',
    );
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
    void this.fetchChoices();
  }

  async show(filter: TurnaroundFilter): Promise<void> {
    this.filter = filter;
    await this.refresh();
  }

  async refresh(): Promise<void> {
    const { filter } = this;
    if (!filter) return;
    const fetch = ++this.fetches;
    this.isFetching.set(true);
    try {
      const figures = await firstValueFrom(this.api.figures(filter));
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.figures.set(figures);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    } finally {
      if (fetch === this.fetches) this.isFetching.set(false);
    }
  }

  async fetchChoices(): Promise<void> {
    this.choicesProblem.set(null);
    try {
      const [people, lifts] = await Promise.all([
        firstValueFrom(this.api.people()),
        firstValueFrom(this.api.lifts()),
      ]);
      this.coaches.set(people.items.filter(({ role }) => role !== 'member'));
      this.lifts.set(lifts.items);
    } catch (error) {
      this.choicesProblem.set(problemOf(error));
    }
  }
}
