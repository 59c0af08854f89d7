import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { AssignmentDto, Page } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { AssignmentsApi } from './assignments-api';

const PAGE_SIZE = 50;
/** Events come in bunches; one fetch answers them all. */
const GATHER_MS = 250;

/** The gym's assignments, newest first, kept true by events. Provided by the page. */
@Injectable()
export class AssignmentsStore {
  private readonly api = inject(AssignmentsApi);
  private readonly next = signal<string | null>(null);
  private fetches = 0;
  /** How many are to be shown, if there are as many. */
  private wanted = PAGE_SIZE;

  /** Null until the first ones are here. */
  readonly assignments = signal<readonly AssignmentDto[] | null>(null);
  readonly problem = signal<Problem | null>(null);
  readonly isFetchingMore = signal(false);
  /** Whether older ones can be fetched. */
  readonly hasMore = computed(() => this.next() !== null);

  constructor() {
    const live = inject(LiveEvents);
    const changes = live.of(
      'assignment.created',
      'take.submitted',
      'take.retried',
      'take.withdrawn',
      'people.changed',
      'lifts.changed',
    );
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
    void this.refresh();
  }

  /** Fetches as many as are shown, at least a page. */
  async refresh(): Promise<void> {
    const fetch = ++this.fetches;
    const { wanted } = this;
    try {
      const items: AssignmentDto[] = [];
      let next: string | null = null;
      do {
        const page: Page<AssignmentDto> = await firstValueFrom(
          this.api.assignments(PAGE_SIZE, next ?? undefined),
        );
        // A later question overtook this one.
        if (fetch !== this.fetches) return;
        items.push(...page.items);
        next = page.next;
      } while (next !== null && items.length < wanted);
      this.show(items, next);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }

  /** Shows a page more. All are fetched anew, so that nothing made or closed meanwhile is missed or stands twice. */
  async more(): Promise<void> {
    if (!this.hasMore() || this.isFetchingMore()) return;
    this.wanted = (this.assignments()?.length ?? 0) + PAGE_SIZE;
    this.isFetchingMore.set(true);
    await this.refresh();
    this.isFetchingMore.set(false);
  }

  private show(items: readonly AssignmentDto[], next: string | null): void {
    this.assignments.set(items);
    this.next.set(next);
    this.problem.set(null);
  }
}
