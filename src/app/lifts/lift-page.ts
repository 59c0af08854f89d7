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
import { BriefFigure } from '../shared/brief-figure/brief-figure';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { distanceM, phoneHeight, phoneWords, repsWords } from '../shared/take-words/brief-words';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { LiftStore } from './lift-store';
import { capital, faultsByPhase, scalesByLevel, viewsWords, viewWords } from './lift-words';
import { tempoWords } from './tempo-words';

/** One lift of the library: its brief, tempo, faults and scales. */
@Component({
  selector: 'mf-lift-page',
  imports: [AbsoluteTime, BriefFigure, MatButton, PageHeading, ProblemBox, RouterLink, Skeleton],
  providers: [LiftStore],
  templateUrl: './lift-page.html',
  styleUrl: './lift-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LiftPage {
  private readonly snackbar = inject(Snackbar);

  protected readonly store = inject(LiftStore);

  /** From the address. */
  readonly liftId = input.required<string>();

  protected readonly isBusy = signal(false);
  protected readonly shown = computed(() => {
    const lift = this.store.lift();
    if (!lift) return null;
    const { brief } = lift;
    return {
      lift,
      pattern: capital(lift.pattern),
      height: phoneHeight(brief.cameraHeightCm),
      distanceM: distanceM(brief.cameraDistanceCm),
      film: `${repsWords(brief)}, ${viewsWords(brief)}; ${phoneWords(brief)}.`,
      tempo: lift.tempo === null ? null : tempoWords(lift.tempo),
      faults: faultsByPhase(lift.faults).map((group) => ({
        ...group,
        items: group.items.map((fault) => ({ ...fault, from: viewWords(fault.view) })),
      })),
      scales: scalesByLevel(lift.scales),
    };
  });

  constructor() {
    effect(() => {
      const id = this.liftId();
      untracked(() => void this.store.open(id));
    });
  }

  protected async setArchived(archived: boolean): Promise<void> {
    this.isBusy.set(true);
    const isDone = await this.store.setArchived(archived);
    this.isBusy.set(false);
    if (!isDone) return;
    const words = archived
      ? 'Archived. It can no longer be assigned; open assignments go on.'
      : 'Back in use.';
    this.snackbar.offerUndo(words, () => void this.setArchived(!archived));
  }
}
