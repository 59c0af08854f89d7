import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MatButton } from '@angular/material/button';
import type { TakeDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { Poster } from '../shared/poster/poster';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { stateSentence, untilAnsweredScale } from '../shared/take-words/take-words';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { FilmCard } from './film-card';
import { todayHeading } from './today-plan';
import { TodayStore } from './today-store';

/** A member's first room: what to film, what is on the way, which answers are new. */
@Component({
  selector: 'mf-today-page',
  imports: [EmptyState, FilmCard, MatButton, PageHeading, Poster, ProblemBox, RouterLink, Skeleton],
  providers: [TodayStore],
  templateUrl: './today-page.html',
  styleUrl: './today-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodayPage {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);
  protected readonly store = inject(TodayStore);
  protected readonly session = inject(SessionStore);

  private readonly now = computed(() => ({ nowMs: this.clock.nowMs(), zone: this.gym.zone() }));

  protected readonly heading = computed(() =>
    this.store.isLoaded() ? todayHeading(this.store.plan(), this.store.unread(), this.now()) : 'Today',
  );
  protected readonly isEmpty = computed(() => {
    const { toFilm, underWay } = this.store.plan();
    return this.store.isLoaded() && toFilm.length + underWay.length + this.store.unread().length === 0;
  });
  protected readonly underWay = computed(() =>
    this.store.plan().underWay.map(({ assignment, take }) => ({
      take,
      sentence: stateSentence(take, this.now()),
      scale: untilAnsweredScale(assignment, take.pain !== null),
      poster: posterOf(take),
    })),
  );
  protected readonly answers = computed(() =>
    this.store
      .unread()
      .map((take) => ({ take, sentence: stateSentence(take, this.now()), poster: posterOf(take) })),
  );
}

function posterOf(take: TakeDto): string | null {
  return take.clips.find((clip) => clip.media !== null)?.media?.poster ?? null;
}
