import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Avatar } from '../shared/avatar/avatar';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { phoneWords, repsWords } from '../shared/take-words/brief-words';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { RelativeTime } from '../shared/times/relative-time';
import { AssignmentStore } from './assignment-store';
import { askedGroups, audienceWords, filmedWords, waitingWords, workWords } from './assignment-words';

/** One assignment: what was asked, and who has filmed, who waits, who has not. */
@Component({
  selector: 'mf-assignment-page',
  imports: [
    AbsoluteTime,
    Avatar,
    EmptyState,
    MatButton,
    PageHeading,
    ProblemBox,
    RelativeTime,
    RouterLink,
    Skeleton,
  ],
  providers: [AssignmentStore],
  templateUrl: './assignment-page.html',
  styleUrl: './assignment-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AssignmentPage {
  private readonly snackbar = inject(Snackbar);

  protected readonly store = inject(AssignmentStore);

  /** From the address. */
  readonly assignmentId = input.required<string>();

  protected readonly isBusy = signal(false);
  protected readonly shown = computed(() => {
    const assignment = this.store.assignment();
    if (!assignment) return null;
    const { asked, lift } = assignment;
    const groups = askedGroups(asked);
    const filmed = filmedWords(assignment.counts ?? { asked: asked.length, filmed: 0 });
    return {
      assignment,
      stand: [filmed, waitingWords(groups)].filter(Boolean).join(' '),
      work: workWords(assignment),
      who: audienceWords(assignment.audience),
      film: `${repsWords(lift.brief)}, ${lift.brief.views.join(' and ')}; ${phoneWords(lift.brief)}`,
      scale: lift.scales.find(({ id }) => id === assignment.untilAnsweredScaleId) ?? null,
      groups,
    };
  });

  constructor() {
    effect(() => {
      const id = this.assignmentId();
      untracked(() => void this.store.open(id));
    });
  }

  protected async setClosed(closed: boolean): Promise<void> {
    this.isBusy.set(true);
    const isDone = await this.store.setClosed(closed);
    this.isBusy.set(false);
    if (!isDone) return;
    const words = closed ? 'Closed: it is off members’ Today.' : 'Open again: it is back on members’ Today.';
    this.snackbar.offerUndo(words, () => void this.setClosed(!closed));
  }
}
