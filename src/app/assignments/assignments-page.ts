import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink, RouterOutlet } from '@angular/router';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { RelativeTime } from '../shared/times/relative-time';
import { audienceWords, openWords, workWords } from './assignment-words';
import { AssignmentsStore } from './assignments-store';

const SHOWN = ['open', 'closed', 'all'] as const;

/** What members are asked to film, newest first. A new one is made in a sheet over the list. */
@Component({
  selector: 'mf-assignments-page',
  imports: [
    AbsoluteTime,
    Chips,
    EmptyState,
    MatButton,
    PageHeading,
    ProblemBox,
    RelativeTime,
    RouterLink,
    RouterOutlet,
    Skeleton,
  ],
  providers: [AssignmentsStore],
  templateUrl: './assignments-page.html',
  styleUrl: './assignments-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AssignmentsPage {
  private readonly router = inject(Router);

  protected readonly store = inject(AssignmentsStore);

  /** Which to show, from the address: open ones unless it says otherwise. */
  readonly show = input<string>();

  protected readonly shown = computed(() => SHOWN.find((shown) => shown === this.show()) ?? 'open');
  protected readonly options: readonly ChipOption[] = [
    { value: 'open', label: 'Open' },
    { value: 'closed', label: 'Closed' },
    { value: 'all', label: 'All' },
  ];
  protected readonly heading = computed(() => {
    const assignments = this.store.assignments();
    if (!assignments) return 'Assignments';
    const open = assignments.filter(({ closedAt }) => closedAt === null).length;
    return openWords(open, !this.store.hasMore());
  });
  protected readonly rows = computed(() => {
    const shown = this.shown();
    return (this.store.assignments() ?? [])
      .filter(({ closedAt }) => shown === 'all' || (closedAt === null) === (shown === 'open'))
      .map((assignment) => {
        const { asked, filmed } = assignment.counts ?? { asked: 0, filmed: 0 };
        return {
          assignment,
          what: [assignment.lift.name, workWords(assignment)].filter(Boolean).join(' · '),
          who: audienceWords(assignment.audience),
          asked,
          filmed,
          share: asked === 0 ? 0 : Math.min(1, filmed / asked),
        };
      });
  });

  protected choose(shown: string): void {
    void this.router.navigate(['/assignments'], {
      queryParams: { show: shown === 'open' ? null : shown },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }
}
