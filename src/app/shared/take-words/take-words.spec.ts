import type { AssignmentDto, ClipDto, TakeDto } from '@contract';
import {
  dueWords,
  inSentence,
  latestTake,
  missingViews,
  stateSentence,
  untilAnsweredScale,
} from './take-words';

// Tuesday 1 December 2026, 13:00 in Stockholm.
const now = { nowMs: Date.parse('2026-12-01T12:00:00.000Z'), zone: 'Europe/Stockholm' };

const clip = (view: 'front' | 'side'): ClipDto => ({
  id: `clip-${view}`,
  takeId: 'take-1',
  view,
  state: 'uploaded',
  progress: 0,
  sizeBytes: 1000,
  sha256: '',
  durationMs: null,
  width: null,
  height: null,
  fps: null,
  frames: null,
  trim: null,
  problem: null,
  media: null,
});

const take = (change: Partial<TakeDto> = {}): TakeDto => ({
  id: 'take-1',
  number: 1,
  state: 'draft',
  assignmentId: 'assignment-1',
  previousTakeId: null,
  member: { id: 'member-1', name: 'Amara Holmqvist' },
  lift: { id: 'lift-1', name: 'Two-handed swing' },
  views: ['front', 'side'],
  neededBy: null,
  load: null,
  implement: null,
  note: null,
  pain: null,
  atStake: null,
  answerBy: '2026-12-01T16:30:00.000Z',
  submittedAt: null,
  answeredAt: null,
  readAt: null,
  pickedUpBy: null,
  pickedUpUntil: null,
  problem: null,
  clips: [],
  createdAt: '2026-12-01T10:00:00.000Z',
  ...change,
});

describe('how a take stands', () => {
  it('says who has it and by when', () => {
    const picked = take({
      state: 'picked-up',
      pickedUpBy: { id: 'coach-1', name: 'Maren Oduya' },
      clips: [clip('front')],
    });
    expect(stateSentence(picked, now)).toBe('Maren has your clip; answer by 17:30.');
  });

  it('does not promise a moment that has passed', () => {
    const late = { answerBy: '2026-12-01T11:00:00.000Z' };
    expect(
      stateSentence(take({ state: 'picked-up', ...late, clips: [clip('front'), clip('side')] }), now),
    ).toBe('A coach has your clips.');
    expect(stateSentence(take({ state: 'waiting', ...late }), now)).toBe(
      'Waiting; the answer was due 12:00 and is late. Your gym sees that.',
    );
  });

  it('says by when a waiting take is answered', () => {
    const waiting = take({ state: 'waiting', answerBy: '2026-12-02T16:00:00.000Z' });
    expect(stateSentence(waiting, now)).toBe('Waiting; your gym answers by tomorrow 17:00.');
  });

  it('says that clips are being prepared', () => {
    expect(stateSentence(take({ state: 'processing' }), now)).toBe('Your clips are being prepared.');
  });

  it('says what a draft still lacks', () => {
    expect(stateSentence(take(), now)).toBe('Not filmed yet.');
    expect(stateSentence(take({ clips: [clip('front')] }), now)).toBe(
      'The front is here; the side is still to film.',
    );
    expect(stateSentence(take({ clips: [clip('front'), clip('side')] }), now)).toBe(
      'Both clips are here; send them when you are ready.',
    );
  });

  it('says why a take cannot be played', () => {
    const problem = {
      reason: 'too-short',
      message: 'The clip is too short to see a rep.',
      remedy: 'Film it all.',
    };
    expect(stateSentence(take({ state: 'unplayable', problem }), now)).toBe(
      'The clip is too short to see a rep.',
    );
  });
});

describe('words about takes', () => {
  it('names the day of a due moment only when it is not today', () => {
    expect(dueWords('2026-12-01T16:30:00.000Z', now)).toBe('17:30');
    expect(dueWords('2026-12-03T17:00:00.000Z', now)).toBe('Thursday 18:00');
  });

  it('puts a lift into a sentence', () => {
    expect(inSentence('Two-handed swing')).toBe('two-handed swing');
    expect(inSentence('RDL')).toBe('RDL');
  });

  it('knows the views that are missing', () => {
    expect(missingViews(take({ clips: [clip('side')] }))).toEqual(['front']);
  });

  it('passes over takes that were taken back', () => {
    const kept = take({ id: 'kept', state: 'answered' });
    expect(latestTake([kept, take({ id: 'gone', state: 'withdrawn' })])).toBe(kept);
    expect(latestTake([])).toBeNull();
  });
});

describe('the scale to use until answered', () => {
  const easier = { id: 'easier', name: 'Swing to the shoulder', level: 'easier' as const, note: '' };
  const assignment: AssignmentDto = {
    id: 'assignment-1',
    lift: {
      id: 'lift-1',
      name: 'Two-handed swing',
      pattern: 'hinge',
      brief: {
        views: ['side'],
        repsMin: 2,
        repsMax: 3,
        cameraHeightCm: 90,
        cameraDistanceCm: 300,
        inFrame: '',
        note: '',
      },
      tempo: null,
      faults: [],
      scales: [easier],
      createdAt: '2026-11-01T10:00:00.000Z',
      archivedAt: null,
    },
    title: 'Swings',
    note: null,
    load: null,
    reps: null,
    rounds: null,
    trainAt: null,
    untilAnsweredScaleId: 'easier',
    audience: { all: true },
    createdBy: { id: 'coach-1', name: 'Maren Oduya' },
    createdAt: '2026-11-30T10:00:00.000Z',
    closedAt: null,
    counts: null,
    myTakes: [],
  };

  it('is the one that the coach named', () => {
    expect(untilAnsweredScale(assignment, false)).toEqual(easier);
    expect(untilAnsweredScale({ ...assignment, untilAnsweredScaleId: null }, false)).toBeNull();
  });

  it('is none while something hurts', () => {
    expect(untilAnsweredScale(assignment, true)).toBeNull();
  });
});
