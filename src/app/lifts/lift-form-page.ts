import {
  afterNextRender,
  ChangeDetectionStrategy,
  ChangeDetectorRef,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  Injector,
  input,
  signal,
  untracked,
} from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule, type AbstractControl, type FormArray } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom, of, startWith, switchMap } from 'rxjs';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { fieldMessage } from '../shared/field/field-message';
import { PageHeading } from '../shared/page-heading/page-heading';
import { applyProblem, SERVER_ERROR } from '../shared/problems/apply-problem';
import { problemOf, type Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { requestKey } from '../shared/request-key/request-key';
import type { HasUnsavedChanges } from '../shared/side-sheet/unsaved-changes';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import {
  bodyOf,
  faultGroup,
  forgetServerErrors,
  liftForm,
  MOST_FAULTS,
  MOST_SCALES,
  movePart,
  placeOf,
  scaleGroup,
  type LiftForm,
} from './lift-form';
import { FAULT_VIEW_ORDER, LEVEL_ORDER, PATTERN_ORDER, PHASE_ORDER } from './lift-words';
import { LiftsApi } from './lifts-api';
import { PartRow } from './part-row';
import { tempoWords } from './tempo-words';

const NOT_YET: Problem = {
  type: 'about:blank',
  title: 'Not saved yet',
  status: 0,
  detail: 'Some fields are not right; each says what it needs.',
};

/** Adds a lift, or changes one. A page of its own and no sheet: a checklist of ten faults wants the room. */
@Component({
  selector: 'mf-lift-form-page',
  imports: [
    Field,
    FieldInput,
    MatButton,
    PageHeading,
    PartRow,
    ProblemBox,
    ReactiveFormsModule,
    RouterLink,
    Skeleton,
  ],
  host: { '(window:beforeunload)': 'warnBeforeUnload($event)' },
  templateUrl: './lift-form-page.html',
  styleUrl: './lift-form-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LiftFormPage implements HasUnsavedChanges {
  private readonly api = inject(LiftsApi);
  private readonly changes = inject(ChangeDetectorRef);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly injector = inject(Injector);
  private readonly router = inject(Router);
  private readonly snackbar = inject(Snackbar);
  /** Stays the same for every try to send the same words. */
  private key = requestKey();

  /** From the address; none for a new lift. */
  readonly liftId = input<string>();

  protected readonly patterns = PATTERN_ORDER;
  protected readonly phases = PHASE_ORDER;
  protected readonly faultViews = FAULT_VIEW_ORDER;
  protected readonly levels = LEVEL_ORDER;
  protected readonly mostFaults = MOST_FAULTS;
  protected readonly mostScales = MOST_SCALES;

  /** Null until the lift is here. */
  protected readonly form = signal<LiftForm | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly isSaving = signal(false);
  protected readonly back = computed(() => {
    const id = this.liftId();
    return id === undefined ? ['/lifts'] : ['/lifts', id];
  });
  protected readonly tempo = toSignal(
    toObservable(this.form).pipe(
      switchMap((form) => {
        const control = form?.controls.tempo;
        return control ? control.valueChanges.pipe(startWith(control.value)) : of('');
      }),
    ),
    { initialValue: '' },
  );
  protected readonly tempoHint = computed(() => {
    const words = tempoWords(this.tempo());
    return words === null
      ? 'Down, pause at the bottom, up, pause at the top, in seconds; X for as fast as possible.'
      : `${words.slice(0, 1).toUpperCase()}${words.slice(1)}.`;
  });

  constructor() {
    effect(() => {
      const id = this.liftId();
      untracked(() => void this.open(id));
    });
  }

  hasUnsavedChanges(): boolean {
    return this.form()?.dirty ?? false;
  }

  protected warnBeforeUnload(event: Event): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  protected async open(id: string | undefined): Promise<void> {
    this.problem.set(null);
    try {
      const form = liftForm(id === undefined ? null : await firstValueFrom(this.api.lift(id)));
      const { repsMin, repsMax } = form.controls.brief.controls;
      repsMin.valueChanges.subscribe(() => repsMax.updateValueAndValidity());
      form.valueChanges.subscribe(() => (this.key = requestKey()));
      this.form.set(form);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** What is wrong with a group that has no single field, such as the views. */
  protected messageOf(control: AbstractControl): string | null {
    return control.touched && control.errors ? fieldMessage(control.errors) : null;
  }

  protected addFault(form: LiftForm): void {
    this.add(form.controls.faults, faultGroup(), 'faults');
  }

  protected addScale(form: LiftForm): void {
    this.add(form.controls.scales, scaleGroup(), 'scales');
  }

  protected move<T extends AbstractControl>(list: FormArray<T>, part: T, by: -1 | 1): void {
    movePart(list, part, by);
  }

  protected remove<T extends AbstractControl>(
    list: FormArray<T>,
    part: T,
    name: string,
    section: string,
  ): void {
    const index = placeOf(list, part);
    if (index < 0) return;
    list.removeAt(index);
    list.markAsDirty();
    this.afterRender(() => this.find(`#${section} .add`)?.focus());
    this.snackbar.offerUndo(`Taken off: ${name}.`, () => {
      list.insert(Math.min(index, list.length), part);
      // The click was on the message, outside this page.
      this.changes.markForCheck();
    });
  }

  protected async save(form: LiftForm): Promise<void> {
    if (this.isSaving()) return;
    forgetServerErrors(form);
    form.markAllAsTouched();
    if (form.invalid) {
      this.refuse(NOT_YET);
      return;
    }
    this.problem.set(null);
    this.isSaving.set(true);
    const id = this.liftId();
    const body = bodyOf(form);
    try {
      const lift = await firstValueFrom(
        id === undefined ? this.api.add(body, this.key) : this.api.change(id, body),
      );
      form.markAsPristine();
      this.snackbar.say(id === undefined ? `${lift.name} is in the library.` : `${lift.name} is saved.`);
      await this.router.navigate(['/lifts', lift.id], { replaceUrl: true });
    } catch (error) {
      this.refuse(this.placed(form, problemOf(error)));
    } finally {
      this.isSaving.set(false);
    }
  }

  /** The problem without what a field of the form says itself. */
  private placed(form: LiftForm, problem: Problem): Problem {
    if (!problem.type.endsWith(':name-taken')) return applyProblem(form, problem);
    form.controls.name.setErrors({ [SERVER_ERROR]: problem.detail });
    return NOT_YET;
  }

  private refuse(problem: Problem): void {
    this.problem.set(problem);
    this.afterRender(() => this.find('[aria-invalid="true"]')?.focus());
  }

  private add<T extends AbstractControl>(list: FormArray<T>, part: T, section: string): void {
    list.push(part);
    list.markAsDirty();
    this.afterRender(() => this.find(`#${section} mf-part-row:last-of-type input`)?.focus());
  }

  private find(selector: string): HTMLElement | null {
    return this.element.querySelector<HTMLElement>(selector);
  }

  private afterRender(run: () => void): void {
    afterNextRender({ read: run }, { injector: this.injector });
  }
}
