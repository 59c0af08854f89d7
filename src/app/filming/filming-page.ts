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
import { RouterLink } from '@angular/router';
import { MatButton } from '@angular/material/button';
import type { ClipDto, View } from '@contract';
import { SessionStore } from '../session/session-store';
import { BriefFigure } from '../shared/brief-figure/brief-figure';
import { Confirm } from '../shared/confirm/confirm';
import { PageHeading } from '../shared/page-heading/page-heading';
import { PainCaution } from '../shared/pain-caution/pain-caution';
import { ProblemBox } from '../shared/problems/problem-box';
import { problemOf } from '../shared/problems/problem';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { distanceM, phoneHeight, phoneWords, repsWords } from '../shared/take-words/brief-words';
import {
  dueWords,
  inSentence,
  stateSentence,
  untilAnsweredScale,
  viewsPhrase,
} from '../shared/take-words/take-words';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { blockers } from './blockers';
import { ClipSlot } from './clip-slot';
import { FilmingStore } from './filming-store';
import { FrameFigure } from './frame-figure';
import type { SendsClips } from './leave-guard';
import { promisedBy } from './promise';
import { isUnderWay } from './upload';
import { ClipUploads } from './uploads';
import { WhatYouSay } from './what-you-say';

/** The reason of a take that failed on the server's side: trying again may help. */
const GAVE_UP = 'gave-up';

/** Filming one assignment, from the brief to the moment the phone can be put away. */
@Component({
  selector: 'mf-filming-page',
  imports: [
    BriefFigure,
    ClipSlot,
    FrameFigure,
    MatButton,
    PageHeading,
    PainCaution,
    ProblemBox,
    RouterLink,
    Skeleton,
    WhatYouSay,
  ],
  providers: [FilmingStore, ClipUploads],
  host: { '(window:beforeunload)': 'warnBeforeUnload($event)' },
  templateUrl: './filming-page.html',
  styleUrl: './filming-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FilmingPage implements SendsClips {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);
  private readonly confirm = inject(Confirm);
  private readonly snackbar = inject(Snackbar);
  protected readonly store = inject(FilmingStore);
  protected readonly uploads = inject(ClipUploads);
  protected readonly session = inject(SessionStore);

  readonly assignmentId = input.required<string>();

  protected readonly neededBy = signal<string | null>(null);
  protected readonly hurts = signal(false);
  private readonly now = computed(() => ({ nowMs: this.clock.nowMs(), zone: this.gym.zone() }));

  protected readonly brief = computed(() => this.store.assignment()?.lift.brief ?? null);
  protected readonly scale = computed(() => {
    const assignment = this.store.assignment();
    const sent = this.store.sent();
    const isHurting = sent ? sent.pain !== null : this.hurts();
    return assignment ? untilAnsweredScale(assignment, isHurting) : null;
  });
  protected readonly heading = computed(() => {
    const assignment = this.store.assignment();
    if (!assignment) return 'Film';
    if (this.store.sent()) return 'You can put the phone away.';
    return `Film your ${inSentence(assignment.lift.name)}, ${viewsPhrase(this.store.views())}.`;
  });
  protected readonly sub = computed(() => {
    const assignment = this.store.assignment();
    if (!assignment) return undefined;
    return `${assignment.title}, take ${this.store.sent()?.number ?? this.store.number()}`;
  });
  protected readonly phone = computed(() => {
    const brief = this.brief();
    if (!brief) return null;
    return {
      words: phoneWords(brief),
      reps: repsWords(brief),
      height: phoneHeight(brief.cameraHeightCm),
      distanceM: distanceM(brief.cameraDistanceCm),
      inFrame: brief.inFrame || 'Head and feet, the whole time',
    };
  });
  protected readonly refilmWords = computed(() => {
    const refilm = this.store.refilm();
    if (!refilm) return null;
    const by = refilm.by ? ` by ${dueWords(refilm.by, this.now())}` : '';
    return `Your coach asks for ${viewsPhrase(refilm.views)} again${by}.${refilm.note ? ` “${refilm.note}”` : ''}`;
  });
  protected readonly brokenTake = computed(() => {
    const take = this.store.take();
    if (take?.state !== 'unplayable') return null;
    // A clip's own problem is told beside the clip.
    const isToldThere =
      take.clips.some(({ problem }) => problem !== null) && take.problem?.reason !== GAVE_UP;
    return isToldThere ? null : take.problem;
  });
  protected readonly canRetry = computed(() => this.brokenTake()?.reason === GAVE_UP);
  protected readonly blockers = computed(() => {
    const states = this.uploads.state();
    const busy = this.store.views().filter((view) => isUnderWay(states[view]));
    const needsConsent = this.session.user()?.needsGuardianConsent ?? false;
    return blockers(this.store.take(), this.store.views(), busy, needsConsent);
  });
  protected readonly promised = computed(() => {
    const gym = this.session.gym();
    return gym ? dueWords(promisedBy(gym, this.neededBy(), this.clock.nowMs()), this.now()) : null;
  });
  protected readonly sentSentence = computed(() => {
    const sent = this.store.sent();
    return sent ? stateSentence(sent, this.now()) : '';
  });
  protected readonly sentBy = computed(() => {
    const sent = this.store.sent();
    return sent?.answerBy && Date.parse(sent.answerBy) > this.clock.nowMs()
      ? dueWords(sent.answerBy, this.now())
      : null;
  });
  protected readonly savingWords = computed(() => {
    switch (this.store.saving()) {
      case 'pending':
        return 'Keeping what you wrote …';
      case 'saved':
        return 'What you wrote is kept.';
      default:
        return '';
    }
  });

  constructor() {
    effect(() => {
      const assignmentId = this.assignmentId();
      untracked(() => void this.store.load(assignmentId));
    });
  }

  /** Whether leaving would cut an upload off. */
  isSending(): boolean {
    return this.uploads.isBusy();
  }

  protected warnBeforeUnload(event: BeforeUnloadEvent): void {
    if (this.isSending()) event.preventDefault();
  }

  protected clipOf(view: View): ClipDto | null {
    return this.store.take()?.clips.find((clip) => clip.view === view) ?? null;
  }

  protected async remove(view: View): Promise<void> {
    const clip = this.clipOf(view);
    if (!clip) return;
    const isSure = await this.confirm.ask({
      heading: `Remove the ${view} clip?`,
      body: 'It is deleted and cannot be brought back. The clip on your phone stays.',
      confirmLabel: 'Remove it',
      cancelLabel: 'Keep it',
    });
    if (!isSure) return;
    try {
      await this.store.removeClip(clip);
      this.snackbar.say(`The ${view} clip is removed.`);
    } catch (error) {
      this.snackbar.say(problemOf(error).detail);
    }
  }
}
