import type { MarkDto, ProgressDto, TakeDto } from '@contract';
import { faultRows, progressHeading } from './fault-rows';

type Mark = MarkDto['mark'];

const take: TakeDto = {
  id: 'take',
  number: 1,
  state: 'answered',
  assignmentId: 'assignment',
  previousTakeId: null,
  member: { id: 'member', name: 'Amara Holmqvist' },
  lift: { id: 'lift', name: 'Two-handed swing' },
  views: ['side'],
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
};

const fault = (id: string) => ({
  id,
  name: id,
  phase: 'bottom' as const,
  view: 'side' as const,
  cue: '',
  drill: null,
});

/** Progress with one lift whose takes carry these marks of the faults "knees" and "back". */
const progress = (...takes: Partial<Record<'knees' | 'back', Mark>>[]): ProgressDto => ({
  member: { id: 'member', name: 'Amara Holmqvist' },
  lifts: [
    {
      lift: {
        id: 'lift',
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
        faults: [fault('knees'), fault('back'), fault('never-marked')],
        scales: [],
        createdAt: '2026-11-01T10:00:00.000Z',
        archivedAt: null,
      },
      takes: takes.map((marks) => ({
        take,
        topCue: null,
        marks: Object.entries(marks).map(([faultId, mark]) => ({ faultId, mark, clipId: null, atMs: null })),
      })),
    },
  ],
});

describe('the heading of progress', () => {
  it('counts what is gone and what is left', () => {
    const both = progress({ knees: 'seen', back: 'seen' }, { knees: 'clear', back: 'seen' });
    expect(progressHeading(both, null)).toBe('One fault gone, one still to go.');
    expect(progressHeading(both, 'Amara')).toBe('Amara: one fault gone, one still to go.');
    expect(progressHeading(progress({ knees: 'seen', back: 'seen' }), null)).toBe('Two faults to work on.');
    expect(progressHeading(progress({ knees: 'seen' }, { knees: 'clear' }), null)).toBe(
      'One fault gone, none left to see.',
    );
  });

  it('says when there is nothing to count', () => {
    expect(progressHeading({ ...progress(), lifts: [] }, null)).toBe('Nothing filmed yet.');
    expect(progressHeading(progress({ knees: 'clear' }), null)).toBe('One take filmed, no fault seen.');
  });
});

describe('the rows of a lift', () => {
  it('hold only faults that were marked, with a place for every take', () => {
    const [lift] = progress({ knees: 'seen' }, {}, { knees: 'clear' }).lifts;
    expect(lift ? faultRows(lift).map(({ name, marks }) => [name, marks]) : []).toEqual([
      ['knees', ['seen', null, 'clear']],
    ]);
  });
});
