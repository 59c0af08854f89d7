import { describe, expect, it } from 'vitest';
import type { CommentDto, FaultDto, LiftDto, MarkDto } from '@contract';
import { EMPTY_DRAFT } from './draft-mirror';
import {
  answerOf,
  closedWords,
  commentBeside,
  faultKey,
  inPhases,
  missingWords,
  nextMark,
  withMark,
} from './board-words';

const lift = {
  scales: [{ id: 's1', name: 'Squat to a chair', level: 'easier', note: '' }],
} as unknown as LiftDto;

describe('a fault’s key', () => {
  it('goes through seen, clear, hidden and back to not marked', () => {
    const first = nextMark(null);
    const second = nextMark(first);
    const third = nextMark(second);
    expect([first, second, third, nextMark(third)]).toEqual(['seen', 'clear', 'hidden', null]);
  });

  it('is a digit for the first ten, and none beyond', () => {
    expect([0, 8, 9, 10].map(faultKey)).toEqual(['1', '9', '0', null]);
  });

  it('sets one mark and leaves the others', () => {
    const other: MarkDto = { faultId: 'b', mark: 'clear', clipId: null, atMs: null };
    const seen: MarkDto = { faultId: 'a', mark: 'seen', clipId: 'c', atMs: 900 };
    expect(withMark([other], 'a', seen)).toEqual([other, seen]);
    expect(withMark([other, seen], 'a', null)).toEqual([other]);
  });
});

describe('an answer', () => {
  it('lacks a top cue and a call at the start, and is none', () => {
    expect(missingWords(EMPTY_DRAFT, lift)).toHaveLength(2);
    expect(answerOf(EMPTY_DRAFT, lift)).toBeNull();
  });

  it('that scales the load names a scale of this lift', () => {
    const draft = { ...EMPTY_DRAFT, topCue: ' Sit back ', call: 'scale' as const };
    expect(answerOf(draft, lift)).toBeNull();
    expect(answerOf({ ...draft, scaleId: 'elsewhere' }, lift)).toBeNull();
    expect(answerOf({ ...draft, scaleId: 's1' }, lift)).toEqual({
      topCue: 'Sit back',
      call: 'scale',
      scaleId: 's1',
    });
  });

  it('carries no scale that was chosen before the call changed', () => {
    const draft = { ...EMPTY_DRAFT, topCue: 'Sit back', call: 'go' as const, scaleId: 's1', tempo: ' ' };
    expect(answerOf(draft, lift)).toEqual({ topCue: 'Sit back', call: 'go' });
  });

  it('asks for another take only with a view', () => {
    const draft = { ...EMPTY_DRAFT, topCue: 'Sit back', call: 'go' as const };
    expect(answerOf({ ...draft, refilm: { views: [] } }, lift)).toBeNull();
    expect(answerOf({ ...draft, refilm: { views: ['side'] } }, lift)?.refilm).toEqual({ views: ['side'] });
  });
});

it('says why a take that does not wait cannot be answered', () => {
  expect(closedWords('waiting')).toBeNull();
  expect(closedWords('answered')).toMatch(/answered/);
  expect(closedWords('withdrawn')).toMatch(/took this take back/);
});

it('lists faults in the order in which a rep goes through them, and no empty phase', () => {
  const faults = [
    { id: 'a', phase: 'up' },
    { id: 'b', phase: 'set-up' },
    { id: 'c', phase: 'up' },
  ] as FaultDto[];
  expect(inPhases(faults).map((group) => [group.phase, group.faults.map((fault) => fault.id)])).toEqual([
    ['set-up', ['b']],
    ['up', ['a', 'c']],
  ]);
});

it('asks for a tempo of four counts, or none', () => {
  const draft = { ...EMPTY_DRAFT, topCue: 'Sit back', call: 'go' as const };
  expect(missingWords({ ...draft, tempo: '30' }, lift)).toHaveLength(1);
  expect(answerOf({ ...draft, tempo: '30' }, lift)).toBeNull();
  expect(answerOf({ ...draft, tempo: '30X0' }, lift)?.tempo).toBe('30X0');
});

describe('going from comment to comment', () => {
  const comments = [100, 500, 900].map((atMs) => ({ id: `k${String(atMs)}`, atMs })) as CommentDto[];

  it('starts from the open one', () => {
    expect(commentBeside(comments, 'k500', 0, 1)?.id).toBe('k900');
    expect(commentBeside(comments, 'k500', 0, -1)?.id).toBe('k100');
    expect(commentBeside(comments, 'k900', 0, 1)).toBeUndefined();
  });

  it('starts from the instant that shows while none is open', () => {
    expect(commentBeside(comments, null, 500, 1)?.id).toBe('k900');
    expect(commentBeside(comments, null, 500, -1)?.id).toBe('k100');
    expect(commentBeside(comments, null, 50, -1)).toBeUndefined();
  });
});
