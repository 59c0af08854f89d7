import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { AssignmentDetailDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { AssignmentsApi } from './assignments-api';

const GATHER_MS = 250;

/** One assignment with who has filmed for it, kept true by events. Provided by the page. */
@Injectable()
export class AssignmentStore {
  private readonly api = inject(AssignmentsApi);
  private id: string | null = null;
  private fetches = 0;

  readonly assignment = signal<AssignmentDetailDto | null>(null);
  readonly problem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    const changes = live.of(
      'assignment.created',
      'take.submitted',
      'take.waiting',
      'take.picked-up',
      'take.put-back',
      'take.lapsed',
      'take.answered',
      'take.unplayable',
      'take.retried',
      'take.withdrawn',
      'people.changed',
      'lifts.changed',
    );
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
  }

  async open(id: string): Promise<void> {
    this.id = id;
    this.assignment.set(null);
    await this.refresh();
  }

  async refresh(): Promise<void> {
    const { id } = this;
    if (id === null) return;
    const fetch = ++this.fetches;
    try {
      const assignment = await firstValueFrom(this.api.assignment(id));
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.assignment.set(assignment);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }

  /**
   * Takes the assignment off members' Today, or puts it back.
   * @returns whether it was done; if not, `problem` says why
   */
  async setClosed(closed: boolean): Promise<boolean> {
    const { id } = this;
    if (id === null) return false;
    try {
      const { closedAt } = await firstValueFrom(closed ? this.api.close(id) : this.api.reopen(id));
      this.assignment.update((shown) => (shown?.id === id ? { ...shown, closedAt } : shown));
      this.problem.set(null);
      return true;
    } catch (error) {
      this.problem.set(problemOf(error));
      return false;
    }
  }
}
