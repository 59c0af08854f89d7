import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  Injector,
  input,
  OnInit,
  signal,
} from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom, map } from 'rxjs';
import type { LiftDto, Person } from '@contract';
import { wallTime } from '../shared/times/wall-time';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { fieldMessage } from '../shared/field/field-message';
import { applyProblem } from '../shared/problems/apply-problem';
import { problemOf, type Problem } from '../shared/problems/problem';
import { ProblemBox } from '../shared/problems/problem-box';
import { requestKey } from '../shared/request-key/request-key';
import { SideSheet } from '../shared/side-sheet/side-sheet';
import type { HasUnsavedChanges } from '../shared/side-sheet/unsaved-changes';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import {
  assignmentForm,
  bodyOf,
  forgetServerErrors,
  previewLines,
  proposedTitle,
  stakeWords,
} from './assignment-form';
import { AssignmentsApi } from './assignments-api';
import { MemberPicker } from './member-picker';

const ALL = 'all';
const SOME = 'some';

/** Asks members to film a lift: a sheet over the list of assignments. */
@Component({
  selector: 'mf-new-assignment-sheet',
  imports: [
    Chips,
    Field,
    FieldInput,
    MatButton,
    MemberPicker,
    ProblemBox,
    ReactiveFormsModule,
    RouterLink,
    SideSheet,
    Skeleton,
  ],
  templateUrl: './new-assignment-sheet.html',
  styleUrl: './new-assignment-sheet.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewAssignmentSheet implements OnInit, HasUnsavedChanges {
  private readonly api = inject(AssignmentsApi);
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly injector = inject(Injector);
  private readonly router = inject(Router);
  private readonly snackbar = inject(Snackbar);
  /** Stays the same for every try to send the same words. */
  private key = requestKey();

  /** The lift to begin with, from the address. */
  readonly lift = input<string>();

  protected readonly form = assignmentForm(() => this.now());
  /** Null until they are here. */
  protected readonly known = signal<{ lifts: LiftDto[]; members: Person[] } | null>(null);
  protected readonly loadProblem = signal<Problem | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly audienceProblem = signal<string | null>(null);
  protected readonly isSending = signal(false);

  private readonly value = toSignal(this.form.valueChanges.pipe(map(() => this.form.getRawValue())), {
    initialValue: this.form.getRawValue(),
  });
  private readonly now = computed(() => ({ nowMs: this.clock.nowMs(), zone: this.gym.zone() }));

  protected readonly audience = computed(() => (this.value().audience.all ? ALL : SOME));
  protected readonly memberIds = computed(() => this.value().audience.memberIds);
  protected readonly audienceOptions = computed<readonly ChipOption[]>(() => [
    { value: ALL, label: 'All members', count: this.known()?.members.length },
    { value: SOME, label: 'Some' },
  ]);
  protected readonly chosenLift = computed(() =>
    this.known()?.lifts.find(({ id }) => id === this.value().liftId),
  );
  protected readonly scaleHint = computed(() =>
    this.chosenLift()?.scales.length === 0
      ? 'This lift has no scales yet.'
      : 'What they do if they train before you have answered.',
  );
  protected readonly earliest = computed(() => {
    const { nowMs, zone } = this.now();
    return wallTime(nowMs, zone);
  });
  protected readonly preview = computed(() => {
    const lift = this.chosenLift();
    return lift ? { title: this.value().title, lines: previewLines(this.value(), lift, this.now()) } : null;
  });
  protected readonly stake = computed(() => stakeWords(this.value()));

  constructor() {
    const { liftId, title, untilAnsweredScaleId } = this.form.controls;
    liftId.valueChanges.pipe(takeUntilDestroyed()).subscribe((id) => {
      untilAnsweredScaleId.setValue('');
      const lift = this.known()?.lifts.find((one) => one.id === id);
      if (lift && title.pristine) title.setValue(proposedTitle(lift));
    });
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => (this.key = requestKey()));
  }

  ngOnInit(): void {
    void this.load();
  }

  hasUnsavedChanges(): boolean {
    return this.form.dirty;
  }

  protected async load(): Promise<void> {
    this.loadProblem.set(null);
    try {
      const [lifts, people] = await Promise.all([
        firstValueFrom(this.api.lifts()),
        firstValueFrom(this.api.people()),
      ]);
      this.known.set({
        lifts: lifts.items.filter((lift) => lift.archivedAt === null),
        members: people.items
          .filter((person) => person.role === 'member' && person.active)
          .sort((a, b) => a.name.localeCompare(b.name)),
      });
      const first = this.known()?.lifts.find(({ id }) => id === this.lift());
      if (first) this.form.controls.liftId.setValue(first.id);
    } catch (error) {
      this.loadProblem.set(problemOf(error));
    }
  }

  protected chooseAudience(audience: string): void {
    const { all } = this.form.controls.audience.controls;
    all.setValue(audience === ALL);
    all.markAsDirty();
    this.audienceProblem.set(null);
  }

  protected chooseMembers(ids: readonly string[]): void {
    const { memberIds } = this.form.controls.audience.controls;
    memberIds.setValue(ids);
    memberIds.markAsDirty();
    this.audienceProblem.set(null);
  }

  protected async send(): Promise<void> {
    if (this.isSending()) return;
    forgetServerErrors(this.form);
    this.form.markAllAsTouched();
    if (this.form.invalid) {
      this.refuse(null);
      return;
    }
    this.problem.set(null);
    this.isSending.set(true);
    try {
      const body = bodyOf(this.form.getRawValue(), this.gym.zone());
      const { id, counts } = await firstValueFrom(this.api.add(body, this.key));
      this.form.markAsPristine();
      const asked = counts?.asked ?? 0;
      this.snackbar.say(asked === 1 ? '1 member is asked to film.' : `${asked} members are asked to film.`);
      await this.router.navigate(['/assignments', id], { replaceUrl: true });
    } catch (error) {
      this.refuse(applyProblem(this.form, problemOf(error)));
    } finally {
      this.isSending.set(false);
    }
  }

  protected close(): void {
    void this.router.navigate(['/assignments'], {
      queryParams: { lift: null },
      queryParamsHandling: 'merge',
    });
  }

  /** Shows what is wrong, and puts the focus on the first field that is. */
  private refuse(problem: Problem | null): void {
    this.problem.set(problem);
    this.audienceProblem.set(fieldMessage(this.form.controls.audience.errors));
    afterNextRender(
      { read: () => this.element.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus() },
      { injector: this.injector },
    );
  }
}
