import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { TakeDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { AnswersApi } from './answers-api';
import { answerRows } from './answers-rows';

const GATHER_MS = 250;

/** My takes and their answers, newest first, kept true by events. Provided by the list's page. */
@Injectable()
export class AnswersStore {
  private readonly api = inject(AnswersApi);
  private readonly takes = signal<readonly TakeDto[] | null>(null);
  private fetches = 0;

  readonly next = signal<string | null>(null);
  readonly problem = signal<Problem | null>(null);
  readonly isLoaded = computed(() => this.takes() !== null);
  readonly rows = computed(() => answerRows(this.takes() ?? []));

  constructor() {
    const live = inject(LiveEvents);
    const changes = live.of(
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
      'take.replied',
    );
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.load());
    void this.load();
  }

  /** Fetches the first page anew. */
  async load(): Promise<void> {
    await this.fetch(null);
  }

  async more(): Promise<void> {
    const next = this.next();
    if (next !== null) await this.fetch(next);
  }

  private async fetch(cursor: string | null): Promise<void> {
    const fetch = ++this.fetches;
    try {
      const page = await firstValueFrom(this.api.takes(cursor));
      if (fetch !== this.fetches) return;
      this.takes.update((known) => (cursor === null ? page.items : [...(known ?? []), ...page.items]));
      this.next.set(page.next);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }
}
