import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  Injector,
  signal,
  type OnInit,
} from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom, map, of, startWith, switchMap } from 'rxjs';
import type { GymDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { PageHeading } from '../shared/page-heading/page-heading';
import { applyProblem } from '../shared/problems/apply-problem';
import { problemOf, type Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import type { HasUnsavedChanges } from '../shared/side-sheet/unsaved-changes';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { timeZoneNames } from '../shared/times/time-zones';
import { GymApi } from './gym-api';
import { changeOf, gymForm, retentionWords, type GymForm } from './gym-form';
import { draftOf, type DraftWeek } from './hours';
import { HoursEditor } from './hours-editor';

const NOT_YET: Problem = {
  type: 'about:blank',
  title: 'Not saved yet',
  status: 0,
  detail: 'Some fields are not right; each says what it needs.',
};

/** What the gym is called, what it promises, when it coaches, and how it keeps clips. */
@Component({
  selector: 'mf-gym-page',
  imports: [
    Field,
    FieldInput,
    HoursEditor,
    MatButton,
    PageHeading,
    ProblemBox,
    ReactiveFormsModule,
    Skeleton,
  ],
  host: { '(window:beforeunload)': 'warnBeforeUnload($event)' },
  templateUrl: './gym-page.html',
  styleUrl: './gym-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GymPage implements OnInit, HasUnsavedChanges {
  private readonly api = inject(GymApi);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly injector = inject(Injector);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);

  /** Null until the gym is here. */
  protected readonly form = signal<GymForm | null>(null);
  protected readonly week = signal<DraftWeek | null>(null);
  /** The hours as they were saved last. */
  private readonly savedWeek = signal<DraftWeek | null>(null);
  protected readonly loadProblem = signal<Problem | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isSaving = signal(false);
  /** Whether saving has been tried with something wrong. */
  protected readonly showsAll = signal(false);
  private readonly value = toSignal(
    toObservable(this.form).pipe(
      switchMap((form) =>
        form
          ? form.valueChanges.pipe(
              startWith(null),
              map(() => form.getRawValue()),
            )
          : of(null),
      ),
    ),
    { initialValue: null },
  );
  protected readonly zones = computed(() => {
    const own = this.session.gym()?.timeZone;
    const names = timeZoneNames();
    return own === undefined || names.includes(own) ? names : [own, ...names];
  });
  protected readonly retentionHint = computed(() => {
    const words = retentionWords(this.value()?.retentionDays ?? null);
    return words === ''
      ? 'The gym’s rule for original files, in days.'
      : `The gym’s rule for original files: ${words} from the day they were sent.`;
  });

  ngOnInit(): void {
    void this.load();
  }

  hasUnsavedChanges(): boolean {
    const isDirty = this.form()?.dirty ?? false;
    return isDirty || JSON.stringify(this.week()) !== JSON.stringify(this.savedWeek());
  }

  protected warnBeforeUnload(event: Event): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  protected async load(): Promise<void> {
    this.loadProblem.set(null);
    try {
      this.show(await firstValueFrom(this.api.gym()));
    } catch (error) {
      this.loadProblem.set(problemOf(error));
    }
  }

  protected async save(form: GymForm, week: DraftWeek): Promise<void> {
    if (this.isSaving()) return;
    // What the server said of the last try must not hold back this one.
    Object.values(form.controls).forEach((control) => control.updateValueAndValidity());
    form.markAllAsTouched();
    const change = changeOf(form, week);
    if (!change) {
      this.showsAll.set(true);
      this.refuse(NOT_YET);
      return;
    }
    this.problem.set(null);
    this.isSaving.set(true);
    try {
      this.show(await firstValueFrom(this.api.change(change)));
      this.snackbar.say('The gym is saved.');
      // Times are shown in the gym's zone, and its name stands in the head of every page.
      await this.session.check();
    } catch (error) {
      this.refuse(applyProblem(form, problemOf(error)));
    } finally {
      this.isSaving.set(false);
    }
  }

  private show(gym: GymDto): void {
    this.form.set(gymForm(gym));
    this.week.set(draftOf(gym.coachingHours));
    this.savedWeek.set(draftOf(gym.coachingHours));
    this.showsAll.set(false);
  }

  /** Shows what is wrong, and puts the focus on the first field that is. */
  private refuse(problem: Problem): void {
    this.problem.set(problem);
    afterNextRender(
      { read: () => this.element.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus() },
      { injector: this.injector },
    );
  }
}
