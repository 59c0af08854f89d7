import { ChangeDetectionStrategy, Component, DestroyRef, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { debounceTime, firstValueFrom } from 'rxjs';
import type { TakeDto } from '@contract';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf, type Problem } from '../shared/problems/problem';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { RelativeTime } from '../shared/times/relative-time';
import { LiveEvents } from '../shell/live-events';
import { QueueApi } from './queue-api';

/** Takes whose clips cannot be played: why, what the member was told to do, and another try. */
@Component({
  selector: 'mf-unplayable-page',
  imports: [EmptyState, MatButton, PageHeading, ProblemBox, RelativeTime, RouterLink, Skeleton],
  template: `
    <div class="mf-page">
      <mf-page-heading
        heading="Takes that cannot be played"
        sub="Their members have been told what to do. A retry helps when the fault was ours."
      >
        <a matButton="outlined" routerLink="/queue">Back to the queue</a>
      </mf-page-heading>
      <mf-problem-box [problem]="problem()">
        <button type="button" class="mf-link-button" (click)="load()">Try again</button>
      </mf-problem-box>
      @if (takes(); as takes) {
        <ul class="mf-list">
          @for (take of takes; track take.id) {
            <li class="take">
              <div>
                <h2>{{ take.member.name }}</h2>
                <p>
                  {{ take.lift.name }} · take {{ take.number }}
                  @if (take.submittedAt; as at) {
                    · <mf-relative-time [at]="at" />
                  }
                </p>
                @if (take.problem; as why) {
                  <p class="mf-quiet">{{ why.message }} {{ why.remedy }}</p>
                }
              </div>
              <button
                matButton="outlined"
                type="button"
                [disabled]="busy() === take.id"
                (click)="retry(take)"
              >
                Try again
              </button>
            </li>
          }
        </ul>
        @if (takes.length === 0) {
          <mf-empty-state icon="check" heading="All clips can be played">
            <p><a routerLink="/queue">Back to the queue</a></p>
          </mf-empty-state>
        }
      } @else if (!problem()) {
        <mf-skeleton shape="row" />
      }
    </div>
  `,
  styles: `
    .take {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      justify-content: space-between;
      gap: var(--mf-space-3);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UnplayablePage {
  private readonly api = inject(QueueApi);
  private readonly snackbar = inject(Snackbar);

  protected readonly takes = signal<readonly TakeDto[] | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly busy = signal<string | null>(null);

  constructor() {
    void this.load();
    inject(LiveEvents)
      .of('take.unplayable', 'take.retried', 'take.waiting', 'take.withdrawn')
      .pipe(debounceTime(250), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.load());
  }

  protected async load(): Promise<void> {
    try {
      this.takes.set((await firstValueFrom(this.api.unplayable())).items);
      this.problem.set(null);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  protected async retry(take: TakeDto): Promise<void> {
    this.busy.set(take.id);
    try {
      await firstValueFrom(this.api.retry(take.id));
      this.snackbar.say(`${take.member.name}’s clips are being tried again.`);
      await this.load();
    } catch (error) {
      this.problem.set(problemOf(error));
    } finally {
      this.busy.set(null);
    }
  }
}
