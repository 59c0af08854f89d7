import { describe, expect, it } from 'vitest';
import type { TakeState } from '@contract';
import {
  askedGroups,
  type AskedMember,
  audienceWords,
  filmedWords,
  findMembers,
  openWords,
  waitingWords,
  workWords,
} from './assignment-words';

function asked(name: string, state: TakeState | null, submittedAt: string | null = null): AskedMember {
  const member = { id: name, name };
  if (state === null) return { member, takes: 0, latest: null };
  return { member, takes: 1, latest: { takeId: `take-of-${name}`, number: 1, state, submittedAt } };
}

describe('the work coming up', () => {
  it.each([
    [{ load: '24 kg', reps: 8, rounds: 4 }, '8 reps × 4 rounds, 24 kg'],
    [{ load: null, reps: 1, rounds: 1 }, '1 rep × 1 round'],
    [{ load: null, reps: null, rounds: 5 }, '5 rounds'],
    [{ load: null, reps: 12, rounds: null }, '12 reps'],
    [{ load: 'one dumbbell', reps: null, rounds: null }, 'one dumbbell'],
    [{ load: null, reps: null, rounds: null }, null],
  ])('is said as far as it is known', (work, words) => {
    expect(workWords(work)).toBe(words);
  });
});

it.each([
  [{ asked: 0, filmed: 0 }, 'Nobody is asked.'],
  [{ asked: 4, filmed: 0 }, 'None of 4 has filmed yet.'],
  [{ asked: 4, filmed: 1 }, '1 of 4 has filmed.'],
  [{ asked: 4, filmed: 3 }, '3 of 4 have filmed.'],
  [{ asked: 4, filmed: 4 }, 'All 4 have filmed.'],
  [{ asked: 1, filmed: 0 }, 'The member asked has not filmed yet.'],
  [{ asked: 1, filmed: 1 }, 'The member asked has filmed.'],
])('says how far the members are', (counts, words) => {
  expect(filmedWords(counts)).toBe(words);
});

it('says who was asked', () => {
  expect(audienceWords({ all: true })).toBe('all members');
  expect(audienceWords({ memberIds: ['a'] })).toBe('1 member');
  expect(audienceWords({ memberIds: ['a', 'b'] })).toBe('2 members');
});

it('counts open assignments only as far as they were fetched', () => {
  expect(openWords(1, true)).toBe('1 assignment is open.');
  expect(openWords(3, false)).toBe('3 or more assignments are open.');
  expect(openWords(0, true)).toBe('No assignment is open.');
});

describe('who has filmed', () => {
  const groups = askedGroups([
    asked('Tove', 'answered', '2026-11-30T10:00:00.000Z'),
    asked('Amara', 'waiting', '2026-12-01T10:00:00.000Z'),
    asked('Siv', null),
    asked('Odd', 'picked-up', '2026-12-01T08:00:00.000Z'),
    asked('Ines', 'unplayable', '2026-12-01T07:00:00.000Z'),
    asked('Bo', 'processing', '2026-12-01T11:00:00.000Z'),
  ]);

  it('puts what waits first, the longest waiting at its top', () => {
    expect(groups.map(({ place, rows }) => [place, rows.map((row) => row.name)])).toEqual([
      ['waiting', ['Odd', 'Amara', 'Bo']],
      ['unplayable', ['Ines']],
      ['not-filmed', ['Siv']],
      ['answered', ['Tove']],
    ]);
  });

  it('leads to the board, to the answer, to the reason, and nowhere where there is nothing yet', () => {
    const links = groups.flatMap(({ rows }) => rows.map((row) => row.link?.path ?? null));
    expect(links).toEqual([
      ['/board', 'take-of-Odd'],
      ['/board', 'take-of-Amara'],
      null,
      ['/queue', 'unplayable'],
      null,
      ['/answers', 'take-of-Tove'],
    ]);
  });

  it('is counted as far as it waits', () => {
    expect(waitingWords(groups)).toBe('3 wait for an answer.');
    expect(waitingWords(askedGroups([asked('Odd', 'waiting')]))).toBe('1 waits for an answer.');
    expect(waitingWords(askedGroups([asked('Siv', null)]))).toBeNull();
  });

  it('has no group without members', () => {
    expect(askedGroups([asked('Siv', null)]).map(({ place }) => place)).toEqual(['not-filmed']);
  });
});

it.each([
  ['sa', ['Siv Sandvær']],
  ['SIV', ['Siv Sandvær', 'Siv Holm']],
  ['si ho', ['Siv Holm']],
  ['', ['Siv Sandvær', 'Siv Holm']],
  ['vær', []],
])('finds members by the beginnings of their names: "%s"', (search, names) => {
  const members = [{ name: 'Siv Sandvær' }, { name: 'Siv Holm' }];
  expect(findMembers(members, search).map(({ name }) => name)).toEqual(names);
});
