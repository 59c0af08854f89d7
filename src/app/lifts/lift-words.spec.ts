import { describe, expect, it } from 'vitest';
import type { FaultDto, LiftDto } from '@contract';
import { countWords, faultsByPhase, liftsByPattern, matchesSearch, scalesByLevel } from './lift-words';

function fault(id: string, phase: FaultDto['phase']): FaultDto {
  return { id, name: `Fault ${id}`, phase, view: 'side', cue: 'Push the floor away', drill: null };
}

function lift(change: Partial<LiftDto> = {}): LiftDto {
  return {
    id: 'l1',
    name: 'Goblet squat',
    pattern: 'squat',
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
    faults: [{ ...fault('a', 'down'), name: 'Knees fall in' }],
    scales: [{ id: 's', name: 'Box squat', level: 'easier', note: '' }],
    createdAt: '2026-11-02T08:00:00.000Z',
    archivedAt: null,
    ...change,
  };
}

describe('faults by phase', () => {
  it('follow the rep, and inside a phase the order they were given', () => {
    const groups = faultsByPhase([fault('a', 'up'), fault('b', 'set-up'), fault('c', 'up')]);
    expect(groups.map((group) => group.heading)).toEqual(['At the set-up', 'On the way up']);
    expect(groups[1]?.items.map((item) => item.id)).toEqual(['a', 'c']);
  });

  it('are no groups where there are none', () => {
    expect(faultsByPhase([])).toEqual([]);
  });
});

it('puts easier scales first', () => {
  const scales = [
    { id: '1', name: 'Heavy', level: 'harder' as const, note: '' },
    { id: '2', name: 'Box', level: 'easier' as const, note: '' },
  ];
  expect(scalesByLevel(scales).map((group) => group.key)).toEqual(['easier', 'harder']);
});

describe('the library', () => {
  const library = [
    lift(),
    lift({ id: 'l2', name: 'Two-handed swing', pattern: 'hinge' }),
    lift({ id: 'l3', name: 'Old squat', archivedAt: '2026-11-03T08:00:00.000Z' }),
  ];

  it('is grouped by pattern and leaves archived lifts out', () => {
    expect(liftsByPattern(library, '', false).map((group) => [group.heading, group.items.length])).toEqual([
      ['Squat', 1],
      ['Hinge', 1],
    ]);
  });

  it('shows archived lifts alone when they are asked for', () => {
    expect(liftsByPattern(library, '', true).flatMap((group) => group.items.map((item) => item.id))).toEqual([
      'l3',
    ]);
  });

  it.each([
    ['goblet', true],
    ['GOB sq', true],
    ['knees', true],
    ['box', true],
    ['quat', false],
    ['goblet swing', false],
    ['  ', true],
  ])('is searched by the beginnings of words: "%s"', (search, isFound) => {
    expect(matchesSearch(lift(), search)).toBe(isFound);
  });
});

it('counts in words', () => {
  expect([0, 1, 2].map((count) => countWords(count, 'fault'))).toEqual(['no faults', '1 fault', '2 faults']);
});
