import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import type { ProgressDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { ProgressApi } from './progress-api';

const GATHER_MS = 400;

/** One member's way with each lift, kept true by events. Provided by the page. */
@Injectable()
export class ProgressStore {
  private readonly api = inject(ProgressApi);
  private memberId: string | undefined;

  readonly progress = signal<ProgressDto | null>(null);
  readonly problem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    merge(
      live.of('take.answered', 'take.submitted', 'take.retried', 'take.withdrawn', 'clip.ready'),
      live.resumed,
    )
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
  }

  async load(memberId: string | undefined): Promise<void> {
    this.memberId = memberId;
    this.progress.set(null);
    await this.refresh();
  }

  async refresh(): Promise<void> {
    const { memberId } = this;
    try {
      const progress = await firstValueFrom(this.api.progress(memberId));
      if (memberId !== this.memberId) return;
      this.progress.set(progress);
      this.problem.set(null);
    } catch (error) {
      if (memberId === this.memberId) this.problem.set(problemOf(error));
    }
  }
}
