import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MatButton } from '@angular/material/button';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { Poster } from '../shared/poster/poster';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { stateSentence } from '../shared/take-words/take-words';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { answersHeading } from './answers-rows';
import { AnswersStore } from './answers-store';

/** All that a member has handed in, with the answers. */
@Component({
  selector: 'mf-answers-page',
  imports: [EmptyState, MatButton, PageHeading, Poster, ProblemBox, RouterLink, Skeleton],
  providers: [AnswersStore],
  template: `
    <div class="mf-page mf-page-narrow">
      <mf-page-heading [heading]="heading()" />
      <mf-problem-box [problem]="store.problem()">
        <button matButton="outlined" type="button" (click)="store.load()">Try again</button>
      </mf-problem-box>
      @if (!store.isLoaded()) {
        @if (!store.problem()) {
          <mf-skeleton shape="row" [count]="4" />
        }
      } @else if (rows().length === 0) {
        <mf-empty-state icon="forum" heading="Nothing has been answered yet">
          Film what your coach asks for; the answer comes here and to your e-mail.
          <a matButton="outlined" routerLink="/today">What to film</a>
        </mf-empty-state>
      } @else {
        <ul class="mf-list">
          @for (row of rows(); track row.take.id) {
            <li>
              <a
                [routerLink]="row.isBroken ? ['/filming', row.take.assignmentId] : ['/answers', row.take.id]"
              >
                <mf-poster class="still" [src]="row.poster" alt="" />
                <span>
                  <strong>{{ row.take.lift.name }}, take {{ row.take.number }}</strong>
                  <span class="mf-quiet">{{ row.sentence }}</span>
                  @if (row.isNew) {
                    <span class="mf-tag">new</span>
                  }
                  @if (row.isBroken) {
                    <span class="mf-tag">film it again</span>
                  }
                </span>
              </a>
            </li>
          }
        </ul>
        @if (store.next()) {
          <button matButton="outlined" type="button" class="more" (click)="store.more()">
            Show older ones
          </button>
        }
      }
    </div>
  `,
  styles: `
    .mf-list > li {
      padding: 0;
    }

    .mf-list a {
      display: flex;
      align-items: center;
      gap: var(--mf-space-3);
      padding: var(--mf-space-3) 0;
      text-decoration: none;
    }

    a > span {
      display: grid;
      gap: 2px;
      justify-items: start;
    }

    a:hover strong {
      text-decoration: underline;
    }

    .still {
      flex: none;
      width: 58px;
    }

    .more,
    mf-empty-state a {
      margin-top: var(--mf-space-3);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AnswersPage {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);
  protected readonly store = inject(AnswersStore);

  protected readonly heading = computed(() =>
    this.store.isLoaded() ? answersHeading(this.store.rows()) : 'Answers',
  );
  protected readonly rows = computed(() => {
    const now = { nowMs: this.clock.nowMs(), zone: this.gym.zone() };
    return this.store.rows().map((take) => ({
      take,
      sentence: stateSentence(take, now),
      poster: take.clips.find((clip) => clip.media !== null)?.media?.poster ?? null,
      isNew: take.state === 'answered' && take.readAt === null,
      isBroken: take.state === 'unplayable',
    }));
  });
}
