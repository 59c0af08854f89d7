import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { AssignmentDto, Refilm, TakeDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { TodayApi } from './today-api';
import { perhapsAskedAgain, planOf } from './today-plan';

/** Events come in bunches; one fetch answers them all. */
const GATHER_MS = 250;

/** What a member has before them today, kept true by events. Provided by the page. */
@Injectable()
export class TodayStore {
  private readonly api = inject(TodayApi);
  private readonly assignments = signal<readonly AssignmentDto[] | null>(null);
  /** A sent answer never changes, so each is asked for once; null where no other take was asked for. */
  private readonly refilms = signal<ReadonlyMap<string, Refilm | null>>(new Map());
  private fetches = 0;

  readonly unread = signal<readonly TakeDto[]>([]);
  readonly problem = signal<Problem | null>(null);
  readonly isLoaded = computed(() => this.assignments() !== null);
  readonly plan = computed(() => {
    const asked = [...this.refilms()].flatMap(([id, refilm]) => (refilm ? [[id, refilm] as const] : []));
    return planOf(this.assignments() ?? [], new Map(asked));
  });

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
      'take.read',
      'take.unplayable',
      'take.retried',
      'take.withdrawn',
      'clip.ready',
      'clip.unplayable',
      'lifts.changed',
    );
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.load());
    void this.load();
  }

  async load(): Promise<void> {
    const fetch = ++this.fetches;
    try {
      const [assignments, unread] = await Promise.all([
        firstValueFrom(this.api.assignments()),
        firstValueFrom(this.api.unread()),
      ]);
      const refilms = await this.askRefilms(assignments.items);
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.refilms.set(refilms);
      this.assignments.set(assignments.items);
      this.unread.set(unread.items);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }

  private async askRefilms(
    assignments: readonly AssignmentDto[],
  ): Promise<ReadonlyMap<string, Refilm | null>> {
    const known = this.refilms();
    const takes = perhapsAskedAgain(assignments).filter((take) => !known.has(take.id));
    const found = await Promise.all(
      takes.map(async ({ id }) => {
        const { answer } = await firstValueFrom(this.api.take(id));
        return [id, answer?.refilm ?? null] as const;
      }),
    );
    return new Map([...known, ...found]);
  }
}
