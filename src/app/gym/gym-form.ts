import {
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
} from '@angular/forms';
import type { GymChange, GymDto } from '@contract';
import { readWeek, type DraftWeek } from './hours';

const DAYS_A_YEAR = 365;

function filled(control: AbstractControl<string>): ValidationErrors | null {
  return control.value.trim() === '' ? { required: true } : null;
}

function whole(control: AbstractControl<number | null>): ValidationErrors | null {
  return control.value === null || Number.isInteger(control.value)
    ? null
    : { whole: 'A whole number, please.' };
}

/** What the gym says of itself, but for its coaching hours. The limits are those of the API. */
export function gymForm(gym: GymDto) {
  return new FormGroup({
    name: new FormControl(gym.name, {
      nonNullable: true,
      validators: [filled, Validators.maxLength(80)],
    }),
    timeZone: new FormControl(gym.timeZone, { nonNullable: true }),
    promiseHours: new FormControl<number | null>(gym.promiseHours, [
      Validators.required,
      Validators.min(0.5),
      Validators.max(200),
    ]),
    retentionDays: new FormControl<number | null>(gym.retentionDays, [
      Validators.required,
      Validators.min(30),
      Validators.max(3650),
      whole,
    ]),
    coachesSeeOriginals: new FormControl(gym.coachesSeeOriginals, { nonNullable: true }),
  });
}

export type GymForm = ReturnType<typeof gymForm>;

/** The form as it is sent, or null while anything in it is wrong. */
export function changeOf(form: GymForm, week: DraftWeek): GymChange | null {
  const { name, promiseHours, retentionDays, ...rest } = form.getRawValue();
  const coachingHours = readWeek(week);
  if (form.invalid || coachingHours === null || promiseHours === null || retentionDays === null) return null;
  return { ...rest, name: name.trim(), promiseHours, retentionDays, coachingHours };
}

/** How long originals are kept, as people say it; empty for no number. */
export function retentionWords(days: number | null): string {
  if (days === null || !Number.isInteger(days) || days <= 0) return '';
  if (days < DAYS_A_YEAR) return days === 1 ? '1 day' : `${days} days`;
  const years = days / DAYS_A_YEAR;
  if (Number.isInteger(years)) return years === 1 ? 'one year' : `${years} years`;
  return `about ${years.toFixed(1)} years`;
}
