import type { AssignmentDto, TakeDto } from '@contract';
import { beforeWords, planOf, todayHeading } from './today-plan';

// Tuesday 1 December 2026, 13:00 in Stockholm.
const now = { nowMs: Date.parse('2026-12-01T12:00:00.000Z'), zone: 'Europe/Stockholm' };

const take = (state: TakeDto['state'], id = `take-${state}`): TakeDto => ({
  id,
  number: 1,
  state,
  assignmentId: 'assignment',
  previousTakeId: null,
  member: { id: 'member', name: 'Amara Holmqvist' },
  lift: { id: 'lift', name: 'Two-handed swing' },
  views: ['front', 'side'],
  neededBy: null,
  load: null,
  implement: null,
  note: null,
  pain: null,
  atStake: null,
  answerBy: null,
  submittedAt: null,
  answeredAt: null,
  readAt: null,
  pickedUpBy: null,
  pickedUpUntil: null,
  problem: null,
  clips: [],
  createdAt: '2026-12-01T10:00:00.000Z',
});

const assignment = (change: Partial<AssignmentDto> = {}): AssignmentDto => ({
  id: 'assignment',
  lift: {
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
    scales: [],
    createdAt: '2026-11-01T10:00:00.000Z',
    archivedAt: null,
  },
  title: 'Swings',
  note: null,
  load: null,
  reps: 30,
  rounds: 5,
  trainAt: '2026-12-03T17:00:00.000Z',
  untilAnsweredScaleId: null,
  audience: { all: true },
  createdBy: { id: 'coach', name: 'Maren Oduya' },
  createdAt: '2026-11-30T10:00:00.000Z',
  closedAt: null,
  counts: null,
  myTakes: [],
  ...change,
});

const none = new Map<string, never>();

describe('the heading of Today', () => {
  it('says what to film and before what', () => {
    expect(todayHeading(planOf([assignment()], none), [], now)).toBe(
      'Film your two-handed swing before Thursday’s 150.',
    );
  });

  it('says that a lift is to be filmed again', () => {
    const answered = take('answered');
    const refilms = new Map([[answered.id, { views: ['side' as const], by: null, note: null }]]);
    const plan = planOf([assignment({ trainAt: null, myTakes: [answered] })], refilms);
    expect(todayHeading(plan, [], now)).toBe('Film your two-handed swing again.');
    expect(plan.toFilm[0]?.views).toEqual(['side']);
  });

  it('speaks of answers and of takes on the way when nothing is to be filmed', () => {
    const waiting = planOf([assignment({ myTakes: [take('waiting')] })], none);
    expect(todayHeading(waiting, [take('answered')], now)).toBe('Your two-handed swing is answered.');
    expect(todayHeading(waiting, [], now)).toBe('Nothing to film. One take is on the way.');
    expect(todayHeading(planOf([], none), [], now)).toBe('Nothing to film today.');
  });
});

describe('before what a lift is filmed', () => {
  it('names the day and what is lifted then', () => {
    expect(beforeWords(assignment({ trainAt: '2026-12-01T17:00:00.000Z' }), now)).toBe(' before today’s 150');
    expect(beforeWords(assignment({ trainAt: '2026-12-10T17:00:00.000Z' }), now)).toBe(
      ' before the 150 on Thu 10 Dec',
    );
    expect(beforeWords(assignment({ rounds: null }), now)).toBe(' before Thursday’s 30');
  });

  it('does without the count when nobody gave one', () => {
    expect(beforeWords(assignment({ reps: null }), now)).toBe(' before Thursday');
    expect(beforeWords(assignment({ reps: null, trainAt: '2026-12-01T17:00:00.000Z' }), now)).toBe(
      ' before today’s training',
    );
  });

  it('says nothing of a day that is unknown or past', () => {
    expect(beforeWords(assignment({ trainAt: null }), now)).toBe('');
    expect(beforeWords(assignment({ trainAt: '2026-12-01T11:00:00.000Z' }), now)).toBe('');
  });
});

describe('what wants filming', () => {
  it('is what nobody filmed, what is begun and what cannot be played', () => {
    const plan = planOf(
      [
        assignment({ id: 'new' }),
        assignment({ id: 'begun', myTakes: [take('draft')] }),
        assignment({ id: 'broken', myTakes: [take('unplayable')] }),
        assignment({ id: 'sent', myTakes: [take('waiting')] }),
        assignment({ id: 'done', myTakes: [take('answered')] }),
        assignment({ id: 'taken-back', myTakes: [take('withdrawn')] }),
        assignment({ id: 'closed', closedAt: '2026-12-01T00:00:00.000Z' }),
      ],
      none,
    );
    expect(plan.toFilm.map((card) => card.assignment.id).sort()).toEqual([
      'begun',
      'broken',
      'new',
      'taken-back',
    ]);
    expect(plan.underWay.map((card) => card.assignment.id)).toEqual(['sent']);
  });

  it('stands in the order in which it is trained, undated last', () => {
    const plan = planOf(
      [
        assignment({ id: 'some-day', trainAt: null }),
        assignment({ id: 'friday', trainAt: '2026-12-04T17:00:00.000Z' }),
        assignment({ id: 'thursday' }),
      ],
      none,
    );
    expect(plan.toFilm.map((card) => card.assignment.id)).toEqual(['thursday', 'friday', 'some-day']);
  });
});
