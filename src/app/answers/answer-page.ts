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
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { MatButton } from '@angular/material/button';
import type { CommentDto, MarkDto, MeasureDto, View } from '@contract';
import { SessionStore } from '../session/session-store';
import { ClipPlayer } from '../shared/clip-player/clip-player';
import {
  firstMoment,
  fragmentMs,
  momentFragment,
  playable,
  type Moment,
} from '../shared/clip-player/loop-window';
import { Confirm } from '../shared/confirm/confirm';
import { StateMark } from '../shared/marks/state-mark';
import { PageHeading } from '../shared/page-heading/page-heading';
import { PainCaution } from '../shared/pain-caution/pain-caution';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { dueWords, stateSentence, untilAnsweredScale } from '../shared/take-words/take-words';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { clipTime } from '../shared/times/time-words';
import { AnswerStore } from './answer-store';
import {
  againWords,
  answeredWords,
  callWords,
  historyLine,
  inTime,
  measureValue,
  measureWords,
  namedMarks,
} from './answer-words';
import { AnswersApi } from './answers-api';
import { MeasureFigure } from './measure-figure';
import { Replies } from './replies';

/** A take and its answer: the instant that matters first, then everything else in order. */
@Component({
  selector: 'mf-answer-page',
  imports: [
    AbsoluteTime,
    ClipPlayer,
    MatButton,
    MeasureFigure,
    PageHeading,
    PainCaution,
    ProblemBox,
    Replies,
    RouterLink,
    Skeleton,
    StateMark,
  ],
  providers: [AnswerStore],
  templateUrl: './answer-page.html',
  styleUrl: './answer-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AnswerPage {
  private readonly api = inject(AnswersApi);
  private readonly clock = inject(Clock);
  private readonly confirm = inject(Confirm);
  private readonly gym = inject(GymZone);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly fragment = toSignal(this.route.fragment, { initialValue: null });
  protected readonly store = inject(AnswerStore);
  protected readonly session = inject(SessionStore);

  readonly takeId = input.required<string>();
  /** The view named in the address. */
  readonly view = input<string>();

  protected readonly moment = signal<Moment | null>(null);
  private readonly now = computed(() => ({ nowMs: this.clock.nowMs(), zone: this.gym.zone() }));

  protected readonly take = this.store.take;
  protected readonly answer = computed(() => this.take()?.answer ?? null);
  protected readonly clips = computed(() => playable(this.take()?.clips ?? []));
  protected readonly comments = computed(() => inTime(this.answer()?.comments ?? []));
  protected readonly isMine = computed(() => this.take()?.member.id === this.session.user()?.id);
  protected readonly title = computed(() => {
    const take = this.take();
    return take ? `${take.lift.name}, take ${take.number}` : 'Answer';
  });
  protected readonly state = computed(() => {
    const take = this.take();
    return take ? stateSentence(take, this.now()) : '';
  });
  protected readonly answered = computed(() => {
    const answer = this.answer();
    return answer ? answeredWords(answer, this.take()?.submittedAt ?? null) : '';
  });
  protected readonly call = computed(() => {
    const answer = this.answer();
    return answer ? callWords(answer) : '';
  });
  protected readonly marks = computed(() => {
    const take = this.take();
    return take?.answer ? namedMarks(take, take.answer.marks) : [];
  });
  protected readonly measures = computed(() =>
    (this.answer()?.measures ?? []).map((measure) => {
      const clip = this.clips().find(({ id }) => id === measure.clipId);
      return {
        measure,
        value: measureValue(measure),
        words: measureWords(measure),
        fault: this.take()?.assignment.lift.faults.find(({ id }) => id === measure.faultId)?.name ?? null,
        isFrontal: clip?.view === 'front' && measure.kind === 'angle',
        width: clip?.width ?? 720,
        height: clip?.height ?? 1280,
      };
    }),
  );
  protected readonly drawing = computed(() => this.shownComment()?.drawing ?? null);
  protected readonly untilScale = computed(() => {
    const take = this.take();
    return take && !take.answer ? untilAnsweredScale(take.assignment, take.pain !== null) : null;
  });
  protected readonly canWithdraw = computed(
    () => this.isMine() && ['processing', 'waiting', 'picked-up'].includes(this.take()?.state ?? ''),
  );
  /** A take that was filmed after this one. */
  protected readonly later = computed(() => {
    const take = this.take();
    const after = take?.assignment.myTakes.filter(
      ({ number, state }) => number > take.number && state !== 'withdrawn',
    );
    return after?.at(-1) ?? null;
  });
  protected readonly again = computed(() => {
    const take = this.take();
    const refilm = take?.answer?.refilm;
    if (!take || !refilm || !this.isMine()) return null;
    return {
      label: againWords(refilm.views, take.assignment.lift.brief.views),
      by: refilm.by === null ? null : dueWords(refilm.by, this.now()),
      note: refilm.note,
    };
  });
  protected readonly history = computed(() => historyLine(this.take()?.history ?? []));
  protected readonly captionsOf = computed(() => {
    const take = this.take();
    return take?.answer ? (view: View) => this.api.captions(take.id, view) : null;
  });
  /** The comment whose instant is shown. */
  protected readonly shownComment = computed(() => {
    const moment = this.moment();
    return (
      this.comments().find((comment) => comment.view === moment?.view && comment.atMs === moment.atMs) ?? null
    );
  });

  constructor() {
    effect(() => {
      const takeId = this.takeId();
      untracked(() => {
        this.moment.set(null);
        void this.store.load(takeId);
      });
    });
    // An event that fetches afresh leaves the player where it is; a new instant in the address moves it.
    effect(() => {
      const take = this.take();
      const addressed = this.addressed();
      const shown = untracked(this.moment);
      if (!take) return;
      if (shown === null) this.moment.set(addressed ?? firstMoment(take.answer, take.clips));
      else if (addressed && (addressed.atMs !== shown.atMs || addressed.view !== shown.view)) {
        this.moment.set(addressed);
      }
    });
  }

  protected readonly clipTime = clipTime;

  /** Shows a comment's instant, still, and keeps it in the address. */
  protected showComment(comment: CommentDto): void {
    this.show({ view: comment.view, atMs: comment.atMs, endMs: comment.endMs, isStill: true });
  }

  protected showMeasure({ clipId, atMs }: MeasureDto): void {
    this.showAt(clipId, atMs);
  }

  protected showMark({ clipId, atMs }: MarkDto): void {
    if (clipId !== null && atMs !== null) this.showAt(clipId, atMs);
  }

  protected keepView(view: View): void {
    this.keepAddress({ view }, null);
  }

  protected async filmAgain(): Promise<void> {
    const take = this.take();
    if (take && (await this.store.filmAgain())) await this.router.navigate(['/filming', take.assignmentId]);
  }

  protected async withdraw(): Promise<void> {
    const isSure = await this.confirm.ask({
      heading: 'Take it back?',
      body: 'Your clips are deleted and nobody answers this take. You can film another one.',
      confirmLabel: 'Take it back',
      cancelLabel: 'Leave it with my gym',
    });
    if (isSure && (await this.store.withdraw())) await this.router.navigateByUrl('/today');
  }

  private showAt(clipId: string, atMs: number): void {
    const view = this.clips().find((clip) => clip.id === clipId)?.view;
    if (view) this.show({ view, atMs, endMs: null, isStill: true });
  }

  private show(moment: Moment): void {
    this.moment.set(moment);
    this.keepAddress({ view: moment.view }, momentFragment(moment.atMs));
    scrollTo({ top: 0 });
  }

  private keepAddress(queryParams: { view: View }, fragment: string | null): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams,
      fragment: fragment ?? undefined,
      replaceUrl: true,
      scroll: 'manual',
    });
  }

  /** The moment that the address names, if it names one that this take has. */
  private addressed(): Moment | null {
    const atMs = fragmentMs(this.fragment());
    const named = this.view();
    const clip = this.clips().find(({ view }) => view === named) ?? this.clips()[0];
    if (atMs === null || !clip) return null;
    return { view: clip.view, atMs: Math.min(atMs, clip.durationMs ?? atMs), endMs: null, isStill: false };
  }
}
