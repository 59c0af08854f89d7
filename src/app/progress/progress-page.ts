import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { MatButton } from '@angular/material/button';
import { SessionStore } from '../session/session-store';
import { EmptyState } from '../shared/empty-state/empty-state';
import { StateMark } from '../shared/marks/state-mark';
import { PageHeading } from '../shared/page-heading/page-heading';
import { Poster } from '../shared/poster/poster';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { faultRows, progressHeading, trendWords } from './fault-rows';
import { ProgressStore } from './progress-store';

/** Per lift the takes in time, and the faults as rows that turn from ring to dot. */
@Component({
  selector: 'mf-progress-page',
  imports: [
    AbsoluteTime,
    EmptyState,
    MatButton,
    PageHeading,
    Poster,
    ProblemBox,
    RouterLink,
    Skeleton,
    StateMark,
  ],
  providers: [ProgressStore],
  templateUrl: './progress-page.html',
  styleUrl: './progress-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProgressPage {
  protected readonly store = inject(ProgressStore);
  protected readonly session = inject(SessionStore);

  /** Whose progress a coach looks at; a member's own page names nobody. */
  readonly memberId = input<string>();

  protected readonly needsMember = computed(() => this.session.isStaff() && !this.memberId());
  protected readonly heading = computed(() => {
    const progress = this.store.progress();
    if (!progress) return 'Progress';
    const isOwn = progress.member.id === this.session.user()?.id;
    return progressHeading(progress, isOwn ? null : progress.member.name);
  });
  protected readonly lifts = computed(() =>
    (this.store.progress()?.lifts ?? [])
      .filter(({ takes }) => takes.length > 0)
      .map((lift) => ({
        id: lift.lift.id,
        name: lift.lift.name,
        takes: lift.takes.map(({ take, topCue }) => ({
          take,
          topCue,
          poster: take.clips.find((clip) => clip.media !== null)?.media?.poster ?? null,
          at: take.submittedAt ?? take.createdAt,
        })),
        faults: faultRows(lift).map((row) => ({ ...row, words: trendWords(row.trend) })),
      })),
  );

  constructor() {
    effect(() => {
      const memberId = this.memberId();
      if (this.needsMember()) return;
      untracked(() => void this.store.load(memberId));
    });
  }
}
