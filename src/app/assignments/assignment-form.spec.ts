import { describe, expect, it } from 'vitest';
import type { LiftDto } from '@contract';
import { applyProblem } from '../shared/problems/apply-problem';
import {
  assignmentForm,
  bodyOf,
  forgetServerErrors,
  previewLines,
  proposedTitle,
  stakeWords,
} from './assignment-form';

const ZONE = 'Europe/Stockholm';
// Tuesday 1 December 2026, 10:00 in Stockholm.
const NOW = { nowMs: Date.parse('2026-12-01T09:00:00.000Z'), zone: ZONE };

const LIFT: LiftDto = {
  id: 'lift',
  name: 'Two-handed swing',
  pattern: 'hinge',
  brief: {
    views: ['front', 'side'],
    repsMin: 2,
    repsMax: 3,
    cameraHeightCm: 90,
    cameraDistanceCm: 300,
    inFrame: '',
    note: '',
  },
  tempo: null,
  faults: [],
  scales: [{ id: 's1', name: 'Dead-stop swing', level: 'easier', note: '' }],
  createdAt: '2026-11-02T08:00:00.000Z',
  archivedAt: null,
};

function filledForm() {
  const form = assignmentForm(() => NOW);
  form.patchValue({
    liftId: 'lift',
    title: ' Film your swing ',
    load: '24 kg',
    reps: 25,
    rounds: 4,
    trainAt: '2026-12-03T18:00',
    untilAnsweredScaleId: 's1',
    note: 'Bell in the picture.',
  });
  return form;
}

describe('a new assignment', () => {
  it('is sent as it was filled in, its time on the gym’s clock', () => {
    const form = filledForm();
    expect(form.valid).toBe(true);
    expect(bodyOf(form.getRawValue(), ZONE)).toEqual({
      liftId: 'lift',
      title: 'Film your swing',
      note: 'Bell in the picture.',
      load: '24 kg',
      reps: 25,
      rounds: 4,
      trainAt: '2026-12-03T17:00:00.000Z',
      untilAnsweredScaleId: 's1',
      audience: { all: true },
    });
  });

  it('sends nothing for what is left empty', () => {
    const form = assignmentForm(() => NOW);
    form.patchValue({ liftId: 'lift', title: 'Film', audience: { all: false, memberIds: ['a', 'b'] } });
    expect(bodyOf(form.getRawValue(), ZONE)).toMatchObject({
      reps: null,
      rounds: null,
      trainAt: null,
      untilAnsweredScaleId: null,
      audience: { memberIds: ['a', 'b'] },
    });
  });

  it('wants a lift, a title, and somebody to ask', () => {
    const form = assignmentForm(() => NOW);
    expect([form.controls.liftId.valid, form.controls.title.valid]).toEqual([false, false]);
    expect(form.controls.audience.valid).toBe(true);
    form.controls.audience.controls.all.setValue(false);
    expect(form.controls.audience.errors).toEqual({ nobody: 'Choose at least one member.' });
    form.controls.audience.controls.memberIds.setValue(['a']);
    expect(form.controls.audience.valid).toBe(true);
  });

  it.each([
    ['2026-12-01T09:59', { time: 'That time has passed.' }],
    ['2026-12-01T10:01', null],
    ['', null],
  ])('is not trained in the past: %s', (trainAt, errors) => {
    const { trainAt: control } = assignmentForm(() => NOW).controls;
    control.setValue(trainAt);
    expect(control.errors).toEqual(errors);
  });

  it('takes whole counts only', () => {
    const { reps } = assignmentForm(() => NOW).controls;
    reps.setValue(2.5);
    expect(reps.errors).toEqual({ whole: 'A whole number, please.' });
    reps.setValue(0);
    expect(reps.valid).toBe(false);
  });

  it('shows the server’s words beside their field until the next try', () => {
    const form = filledForm();
    const left = applyProblem(form, {
      type: 'urn:midfoot:problem:no-such-member',
      title: 'Refused',
      status: 422,
      detail: '',
      errors: [{ path: 'audience', message: 'One of those you chose is not an active member.' }],
    });
    expect(left.errors).toEqual([]);
    expect(form.controls.audience.errors).toEqual({
      server: 'One of those you chose is not an active member.',
    });
    forgetServerErrors(form);
    expect(form.valid).toBe(true);
  });
});

describe('what members will see', () => {
  it('is said in the words of their Today', () => {
    expect(previewLines(filledForm().getRawValue(), LIFT, NOW)).toEqual([
      '2 or 3 reps from the front and from the side, 24 kg.',
      'You train it Thursday 18:00.',
      'Until answered: Dead-stop swing.',
      'Bell in the picture.',
    ]);
  });

  it('leaves out what is not said', () => {
    expect(previewLines(assignmentForm(() => NOW).getRawValue(), LIFT, NOW)).toEqual([
      '2 or 3 reps from the front and from the side.',
    ]);
  });
});

it('proposes a title that fits', () => {
  expect(proposedTitle(LIFT)).toBe('Film your two-handed swing');
});

it('multiplies what is at stake', () => {
  expect(stakeWords({ reps: 25, rounds: 4 })).toBe('100 reps are at stake for each member.');
  expect(stakeWords({ reps: 25, rounds: null })).toBeNull();
});
