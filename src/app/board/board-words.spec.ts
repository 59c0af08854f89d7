import { describe, expect, it } from 'vitest';
import type { LiftDto, MarkDto } from '@contract';
import { EMPTY_DRAFT } from './draft-mirror';
import { answerOf, closedWords, faultKey, missingWords, nextMark, withMark } from './board-words';

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
