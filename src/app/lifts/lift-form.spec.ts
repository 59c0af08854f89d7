import { describe, expect, it } from 'vitest';
import type { LiftDto } from '@contract';
import { applyProblem } from '../shared/problems/apply-problem';
import { bodyOf, faultGroup, forgetServerErrors, liftForm, movePart, type LiftForm } from './lift-form';

const LIFT: LiftDto = {
  id: 'lift',
  name: 'Goblet squat',
  pattern: 'squat',
  brief: {
    views: ['side'],
    repsMin: 2,
    repsMax: 3,
    cameraHeightCm: 80,
    cameraDistanceCm: 280,
    inFrame: 'All of you',
    note: '',
  },
  tempo: '30X0',
  faults: [
    { id: 'f1', name: 'Knees fall in', phase: 'down', view: 'front', cue: 'Spread the floor', drill: null },
    { id: 'f2', name: 'Heels lift', phase: 'bottom', view: 'side', cue: 'Leave prints', drill: 'Heel taps' },
  ],
  scales: [{ id: 's1', name: 'Box squat', level: 'easier', note: 'To a chair' }],
  createdAt: '2026-11-02T08:00:00.000Z',
  archivedAt: null,
};

const PROBLEM = { type: 'urn:midfoot:problem:bad-input', title: 'Not understood', status: 400, detail: '' };

function moveAt(form: LiftForm, index: number, by: -1 | 1): boolean {
  return movePart(form.controls.faults, form.controls.faults.at(index), by);
}

describe('the form of a lift', () => {
  it('sends back what it was given', () => {
    const { name, pattern, brief, tempo, faults, scales } = LIFT;
    expect(bodyOf(liftForm(LIFT))).toEqual({
      name,
      pattern,
      brief,
      tempo,
      faults: faults.map((fault) => ({ ...fault, drill: fault.drill ?? '' })),
      scales,
    });
  });

  it('gives a new fault no id and keeps the others', () => {
    const form = liftForm(LIFT);
    form.controls.faults.push(faultGroup());
    expect(bodyOf(form).faults?.map((fault) => fault.id)).toEqual(['f1', 'f2', undefined]);
    expect('id' in (bodyOf(form).faults?.[2] ?? { id: '' })).toBe(false);
  });

  it('wants a name, a view and words for every fault', () => {
    const form = liftForm(null);
    expect(form.valid).toBe(false);
    form.controls.name.setValue('  ');
    expect(form.controls.name.valid).toBe(false);
    form.controls.name.setValue('Row');
    expect(form.valid).toBe(true);
    form.controls.brief.controls.views.setValue({ front: false, side: false });
    expect(form.controls.brief.controls.views.errors).toEqual({ views: 'Ask for at least one view.' });
    form.controls.brief.controls.views.setValue({ front: true, side: false });
    form.controls.faults.push(faultGroup());
    expect(form.valid).toBe(false);
  });

  it('does not take fewer most reps than fewest', () => {
    const { repsMax } = liftForm(LIFT).controls.brief.controls;
    repsMax.setValue(1);
    expect(repsMax.errors).toEqual({ below: 'The most reps cannot be below the fewest.' });
    repsMax.setValue(2.5);
    expect(repsMax.errors).toEqual({ whole: 'A whole number, please.' });
    repsMax.setValue(2);
    expect(repsMax.valid).toBe(true);
  });

  it.each([
    ['', null, true],
    [' 40x0 ', '40X0', true],
    ['10-0-2-0', '10-0-2-0', true],
    ['X010', 'X010', false],
    ['301', '301', false],
  ])('reads the tempo "%s"', (written, sent, isValid) => {
    const form = liftForm(LIFT);
    form.controls.tempo.setValue(written);
    expect(form.controls.tempo.valid).toBe(isValid);
    expect(bodyOf(form).tempo).toBe(sent);
  });

  it('puts the server’s words on a fault’s own field, also after it was moved, until the next try', () => {
    const form = liftForm(LIFT);
    expect(moveAt(form, 1, -1)).toBe(true);
    const left = applyProblem(form, { ...PROBLEM, errors: [{ path: 'faults.0.cue', message: 'Too long.' }] });
    expect(left.errors).toEqual([]);
    const heels = form.controls.faults.controls.find((fault) => fault.value.id === 'f2');
    expect(heels?.controls.cue.errors).toEqual({ server: 'Too long.' });
    expect(form.valid).toBe(false);
    forgetServerErrors(form);
    expect(form.valid).toBe(true);
  });
});

describe('moving a part', () => {
  it('changes the order that is sent and marks the form as changed', () => {
    const form = liftForm(LIFT);
    expect(moveAt(form, 0, 1)).toBe(true);
    expect(bodyOf(form).faults?.map((fault) => fault.id)).toEqual(['f2', 'f1']);
    expect(form.dirty).toBe(true);
  });

  it('stops at both ends', () => {
    const form = liftForm(LIFT);
    expect(moveAt(form, 0, -1)).toBe(false);
    expect(moveAt(form, 1, 1)).toBe(false);
    expect(bodyOf(form).faults?.map((fault) => fault.id)).toEqual(['f1', 'f2']);
    expect(form.dirty).toBe(false);
  });
});
