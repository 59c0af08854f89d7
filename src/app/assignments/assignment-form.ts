import {
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
} from '@angular/forms';
import type { LiftDto } from '@contract';
import { instantOfWall } from '../shared/times/wall-time';
import { SERVER_ERROR } from '../shared/problems/apply-problem';
import { repsWords } from '../shared/take-words/brief-words';
import { dueWords, inSentence, type Now } from '../shared/take-words/take-words';
import type { NewAssignmentBody } from './assignments-api';

function filled(control: AbstractControl<string>): ValidationErrors | null {
  return control.value.trim() === '' ? { required: true } : null;
}

function whole(control: AbstractControl<number | null>): ValidationErrors | null {
  return control.value === null || Number.isInteger(control.value)
    ? null
    : { whole: 'A whole number, please.' };
}

interface Audience {
  all: boolean;
  memberIds: readonly string[];
}

function somebody(control: AbstractControl<Audience>): ValidationErrors | null {
  const { all, memberIds } = control.value;
  return all || memberIds.length > 0 ? null : { nobody: 'Choose at least one member.' };
}

function text(most: number): FormControl<string> {
  return new FormControl('', { nonNullable: true, validators: Validators.maxLength(most) });
}

function count(most: number): FormControl<number | null> {
  return new FormControl<number | null>(null, [whole, Validators.min(1), Validators.max(most)]);
}

/** The form of a new assignment; `now` is asked whenever its time is judged. */
export function assignmentForm(now: () => Now) {
  const ahead = (control: AbstractControl<string>): ValidationErrors | null => {
    if (control.value === '') return null;
    const { nowMs, zone } = now();
    const atMs = instantOfWall(control.value, zone);
    if (Number.isNaN(atMs)) return { time: 'Give a day and a time.' };
    return atMs > nowMs ? null : { time: 'That time has passed.' };
  };
  return new FormGroup({
    liftId: new FormControl('', { nonNullable: true, validators: filled }),
    title: new FormControl('', { nonNullable: true, validators: [filled, Validators.maxLength(120)] }),
    audience: new FormGroup(
      {
        all: new FormControl(true, { nonNullable: true }),
        memberIds: new FormControl<readonly string[]>([], { nonNullable: true }),
      },
      somebody,
    ),
    load: text(60),
    reps: count(1000),
    rounds: count(100),
    trainAt: new FormControl('', { nonNullable: true, validators: ahead }),
    untilAnsweredScaleId: new FormControl('', { nonNullable: true }),
    note: text(1000),
  });
}
export type AssignmentForm = ReturnType<typeof assignmentForm>;
export type AssignmentValue = ReturnType<AssignmentForm['getRawValue']>;

/** The title that is proposed for a lift. */
export function proposedTitle(lift: Pick<LiftDto, 'name'>): string {
  return `Film your ${inSentence(lift.name)}`.slice(0, 120);
}

function trainAtOf(value: Pick<AssignmentValue, 'trainAt'>, zone: string): string | null {
  const atMs = instantOfWall(value.trainAt, zone);
  return Number.isNaN(atMs) ? null : new Date(atMs).toISOString();
}

/** What a valid form sends. */
export function bodyOf(value: AssignmentValue, zone: string): NewAssignmentBody {
  return {
    liftId: value.liftId,
    title: value.title.trim(),
    note: value.note.trim(),
    load: value.load.trim(),
    reps: value.reps,
    rounds: value.rounds,
    trainAt: trainAtOf(value, zone),
    untilAnsweredScaleId: value.untilAnsweredScaleId === '' ? null : value.untilAnsweredScaleId,
    audience: value.audience.all ? { all: true } : { memberIds: [...value.audience.memberIds] },
  };
}

/** What members will read under the title, one sentence a line. */
export function previewLines(value: AssignmentValue, lift: LiftDto, now: Now): string[] {
  const where = lift.brief.views.map((view) => `from the ${view}`).join(' and ');
  const load = value.load.trim();
  const lines = [`${repsWords(lift.brief)} ${where}${load === '' ? '' : `, ${load}`}.`];
  const trainAt = trainAtOf(value, now.zone);
  if (trainAt !== null && Date.parse(trainAt) > now.nowMs)
    lines.push(`You train it ${dueWords(trainAt, now)}.`);
  const scale = lift.scales.find(({ id }) => id === value.untilAnsweredScaleId);
  if (scale) lines.push(`Until answered: ${scale.name}.`);
  const note = value.note.trim();
  if (note !== '') lines.push(note);
  return lines;
}

/** The reps that stand behind an answer, for the coach; null where they are not said. */
export function stakeWords({ reps, rounds }: Pick<AssignmentValue, 'reps' | 'rounds'>): string | null {
  if (reps === null || rounds === null) return null;
  return `${reps * rounds} reps are at stake for each member.`;
}

/** Forgets what the server said about the last try, so that the next one is judged afresh. */
export function forgetServerErrors(form: AssignmentForm): void {
  for (const control of Object.values<AbstractControl>(form.controls)) {
    if (control.hasError(SERVER_ERROR)) control.updateValueAndValidity();
  }
}
