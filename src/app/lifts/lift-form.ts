import {
  FormArray,
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
  type ValidatorFn,
} from '@angular/forms';
import { parseTempo } from '@calc/tempo';
import type { FaultDto, LiftDto, Pattern, Phase, ScaleDto, View } from '@contract';
import { SERVER_ERROR } from '../shared/problems/apply-problem';
import type { NewLiftBody } from './lifts-api';

export const MOST_FAULTS = 30;
export const MOST_SCALES = 20;

/** Where the phone stands and what it sees unless the coach says otherwise. */
const FIRST_BRIEF: LiftDto['brief'] = {
  views: ['front', 'side'],
  repsMin: 2,
  repsMax: 3,
  cameraHeightCm: 90,
  cameraDistanceCm: 300,
  inFrame: 'Head, feet and the weight, all through the rep',
  note: '',
};

function filled(control: AbstractControl<string>): ValidationErrors | null {
  return control.value.trim() === '' ? { required: true } : null;
}

function whole(control: AbstractControl<number | null>): ValidationErrors | null {
  return control.value === null || Number.isInteger(control.value)
    ? null
    : { whole: 'A whole number, please.' };
}

function readableTempo(control: AbstractControl<string>): ValidationErrors | null {
  const written = control.value.trim().toUpperCase();
  if (written === '' || parseTempo(written)) return null;
  return { tempo: 'Write a tempo as four counts, for instance 30X0 or 10-0-2-0.' };
}

function someView(control: AbstractControl<{ front: boolean; side: boolean }>): ValidationErrors | null {
  return control.value.front || control.value.side ? null : { views: 'Ask for at least one view.' };
}

/** Stands on the upper number, so that its own words say what is wrong; `revalidated` when the lower one changes. */
function notBelow(least: AbstractControl<number | null>): ValidatorFn {
  return (control: AbstractControl<number | null>) =>
    control.value !== null && least.value !== null && control.value < least.value
      ? { below: 'The most reps cannot be below the fewest.' }
      : null;
}

function words(value: string, most: number): FormControl<string> {
  return new FormControl(value, { nonNullable: true, validators: [filled, Validators.maxLength(most)] });
}

function optionalWords(value: string, most: number): FormControl<string> {
  return new FormControl(value, { nonNullable: true, validators: Validators.maxLength(most) });
}

function choice<T>(value: T): FormControl<T> {
  return new FormControl(value, { nonNullable: true });
}

function count(value: number, least: number, most: number): FormControl<number | null> {
  return new FormControl(value, [Validators.required, whole, Validators.min(least), Validators.max(most)]);
}

/** A fault as it is edited; `id` is null until it has been saved. */
export function faultGroup(fault: FaultDto | null = null) {
  return new FormGroup({
    id: choice<string | null>(fault?.id ?? null),
    name: words(fault?.name ?? '', 80),
    phase: choice<Phase>(fault?.phase ?? 'throughout'),
    view: choice<FaultDto['view']>(fault?.view ?? 'either'),
    cue: words(fault?.cue ?? '', 120),
    drill: optionalWords(fault?.drill ?? '', 300),
  });
}
export type FaultGroup = ReturnType<typeof faultGroup>;

/** A scale as it is edited; `id` is null until it has been saved. */
export function scaleGroup(scale: ScaleDto | null = null) {
  return new FormGroup({
    id: choice<string | null>(scale?.id ?? null),
    name: words(scale?.name ?? '', 80),
    level: choice<ScaleDto['level']>(scale?.level ?? 'easier'),
    note: optionalWords(scale?.note ?? '', 300),
  });
}
export type ScaleGroup = ReturnType<typeof scaleGroup>;

function briefGroup(brief: LiftDto['brief']) {
  const repsMin = count(brief.repsMin, 1, 50);
  const repsMax = count(brief.repsMax, 1, 50);
  repsMax.addValidators(notBelow(repsMin));
  return new FormGroup({
    views: new FormGroup(
      { front: choice(brief.views.includes('front')), side: choice(brief.views.includes('side')) },
      someView,
    ),
    repsMin,
    repsMax,
    cameraHeightCm: count(brief.cameraHeightCm, 0, 300),
    cameraDistanceCm: count(brief.cameraDistanceCm, 50, 1500),
    inFrame: optionalWords(brief.inFrame, 200),
    note: optionalWords(brief.note, 500),
  });
}

/** The form of a lift, its parts at the API's own paths, so that the server's words find their field. */
export function liftForm(lift: LiftDto | null) {
  return new FormGroup({
    name: words(lift?.name ?? '', 80),
    pattern: choice<Pattern>(lift?.pattern ?? 'squat'),
    brief: briefGroup(lift?.brief ?? FIRST_BRIEF),
    tempo: new FormControl(lift?.tempo ?? '', { nonNullable: true, validators: readableTempo }),
    faults: new FormArray((lift?.faults ?? []).map((fault) => faultGroup(fault))),
    scales: new FormArray((lift?.scales ?? []).map((scale) => scaleGroup(scale))),
  });
}
export type LiftForm = ReturnType<typeof liftForm>;

function kept<T extends { id: string | null }>({ id, ...rest }: T): Omit<T, 'id'> & { id?: string } {
  return id === null ? rest : { ...rest, id };
}

/** What a valid form sends: faults and scales in the order in which they stand, each known one with its id. */
export function bodyOf(form: LiftForm): NewLiftBody {
  const { name, pattern, brief, tempo, faults, scales } = form.getRawValue();
  const views: View[] = [];
  if (brief.views.front) views.push('front');
  if (brief.views.side) views.push('side');
  const written = tempo.trim().toUpperCase();
  return {
    name: name.trim(),
    pattern,
    brief: {
      views,
      repsMin: brief.repsMin ?? 0,
      repsMax: brief.repsMax ?? 0,
      cameraHeightCm: brief.cameraHeightCm ?? 0,
      cameraDistanceCm: brief.cameraDistanceCm ?? 0,
      inFrame: brief.inFrame.trim(),
      note: brief.note.trim(),
    },
    tempo: written === '' ? null : written,
    faults: faults.map((fault) => kept(fault)),
    scales: scales.map((scale) => kept(scale)),
  };
}

/** Moves a part of a list by one place; at the end of the list it stays. @returns whether it moved */
export function movePart<T extends AbstractControl>(list: FormArray<T>, part: T, by: -1 | 1): boolean {
  const from = placeOf(list, part);
  const to = from + by;
  if (from < 0 || to < 0 || to >= list.length) return false;
  list.removeAt(from, { emitEvent: false });
  list.insert(to, part);
  list.markAsDirty();
  return true;
}

/** The place of a part in its list, or -1. */
export function placeOf<T extends AbstractControl>(list: FormArray<T>, part: T): number {
  const parts: readonly AbstractControl[] = list.controls;
  return parts.indexOf(part);
}

/** Forgets what the server said about the last try, so that the next one is judged afresh. */
export function forgetServerErrors(control: AbstractControl): void {
  if (control instanceof FormGroup || control instanceof FormArray) {
    for (const child of Object.values(control.controls as Record<string, AbstractControl>)) {
      forgetServerErrors(child);
    }
  }
  if (control.hasError(SERVER_ERROR)) control.updateValueAndValidity();
}
