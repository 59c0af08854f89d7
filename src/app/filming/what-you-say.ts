import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  inject,
  input,
  output,
  signal,
  type OnInit,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import type { AssignmentDto, TakeDto } from '@contract';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { PainCaution } from '../shared/pain-caution/pain-caution';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import type { Words } from './filming-api';
import { instantOfWall, wallTime } from '../shared/times/wall-time';
import { trainChoices } from './train-times';

const OTHER = 'other';
const NO_RUSH = 'no-rush';

/** What the member says about a take: when it is trained, with what, and whether anything hurts. */
@Component({
  selector: 'mf-what-you-say',
  imports: [Chips, Field, FieldInput, PainCaution, ReactiveFormsModule],
  templateUrl: './what-you-say.html',
  styleUrl: './what-you-say.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WhatYouSay implements OnInit {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);
  private readonly destroyRef = inject(DestroyRef);

  readonly assignment = input.required<AssignmentDto>();
  /** The open take as it was when the page was opened; null while there is none. */
  readonly take = input<TakeDto | null>(null);
  /** What was said anew. */
  readonly said = output<Words>();
  /** When the lift is trained, as chosen at present; null for no rush. */
  readonly neededBySaid = output<string | null>();
  /** Whether something hurts, at once, before it is said where. */
  readonly hurtsSaid = output<boolean>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    load: ['', Validators.maxLength(60)],
    implement: ['', Validators.maxLength(80)],
    note: ['', Validators.maxLength(500)],
    hurts: [false],
    where: ['', Validators.maxLength(120)],
    level: [3],
    other: [''],
  });

  protected readonly choice = signal(NO_RUSH);
  protected readonly hurts = signal(false);
  protected readonly level = signal(3);
  protected readonly lacksPlace = signal(false);
  protected readonly otherProblem = signal<string | null>(null);
  protected readonly minOther = computed(() => wallTime(this.clock.nowMs(), this.gym.zone()));
  private readonly trainChoices = computed(() =>
    trainChoices(this.assignment().trainAt, { nowMs: this.clock.nowMs(), zone: this.gym.zone() }),
  );
  protected readonly options = computed<ChipOption[]>(() => [
    ...this.trainChoices().map(({ value, label }) => ({ value, label })),
    { value: OTHER, label: 'another time' },
  ]);

  ngOnInit(): void {
    this.fillIn();
    const { controls } = this.form;
    const within = takeUntilDestroyed<unknown>(this.destroyRef);
    for (const name of ['load', 'implement', 'note'] as const) {
      controls[name].valueChanges.pipe(within).subscribe(() => {
        const control = controls[name];
        if (control.valid) this.said.emit({ [name]: control.value.trim() });
      });
    }
    controls.hurts.valueChanges.pipe(within).subscribe((hurts) => {
      this.hurts.set(Boolean(hurts));
      this.hurtsSaid.emit(this.hurts());
      this.sayPain();
    });
    controls.where.valueChanges.pipe(within).subscribe(() => this.sayPain());
    controls.level.valueChanges.pipe(within).subscribe((level) => {
      this.level.set(Number(level));
      this.sayPain();
    });
    controls.other.valueChanges.pipe(within).subscribe(() => this.sayOther());
  }

  protected choose(value: string): void {
    this.choice.set(value);
    if (value === OTHER) return this.sayOther();
    this.otherProblem.set(null);
    this.sayNeededBy(this.trainChoices().find((choice) => choice.value === value)?.at ?? null);
  }

  private fillIn(): void {
    const take = this.take();
    const pain = take?.pain ?? null;
    const assignment = this.assignment();
    const isAhead = assignment.trainAt !== null && Date.parse(assignment.trainAt) > this.clock.nowMs();
    const neededBy = take ? take.neededBy : isAhead ? assignment.trainAt : null;
    this.form.setValue(
      {
        load: (take ? take.load : assignment.load) ?? '',
        implement: take?.implement ?? '',
        note: take?.note ?? '',
        hurts: pain !== null,
        where: pain?.where ?? '',
        level: pain?.level ?? 3,
        other: neededBy === null ? '' : wallTime(Date.parse(neededBy), this.gym.zone()),
      },
      { emitEvent: false },
    );
    this.hurts.set(pain !== null);
    this.level.set(pain?.level ?? 3);
    const same = this.trainChoices().find(
      ({ at }) => (at === null ? Number.NaN : Date.parse(at)) === Date.parse(neededBy ?? ''),
    );
    this.choice.set(neededBy === null ? NO_RUSH : (same?.value ?? OTHER));
    this.neededBySaid.emit(neededBy);
    this.hurtsSaid.emit(this.hurts());
  }

  private sayOther(): void {
    if (this.choice() !== OTHER) return;
    const atMs = instantOfWall(this.form.controls.other.value, this.gym.zone());
    if (Number.isNaN(atMs)) return this.otherProblem.set('Choose a day and a time.');
    if (atMs <= this.clock.nowMs()) return this.otherProblem.set('Choose a time that is still ahead.');
    this.otherProblem.set(null);
    this.sayNeededBy(new Date(atMs).toISOString());
  }

  private sayNeededBy(neededBy: string | null): void {
    this.said.emit({ neededBy });
    this.neededBySaid.emit(neededBy);
  }

  private sayPain(): void {
    const where = this.form.controls.where.value.trim();
    this.lacksPlace.set(this.hurts() && where === '');
    if (!this.hurts()) this.said.emit({ pain: null });
    else if (where !== '' && this.form.controls.where.valid)
      this.said.emit({ pain: { where, level: this.level() } });
  }
}
