import { describe, expect, it } from 'vitest';
import { noticeOf } from './board-notice';

const by = { id: 'p', name: 'Petru Salas' };

describe('how a take stands for this coach', () => {
  it('goes without saying while it is theirs', () => {
    expect(noticeOf(null, { kind: 'held', untilMs: 1 }, false)).toBeNull();
    expect(noticeOf(null, { kind: 'asking' }, false)).toBeNull();
  });

  it('says first why nobody can answer it', () => {
    expect(noticeOf('It is answered.', { kind: 'lapsed' }, false)).toEqual({
      words: 'It is answered.',
      act: null,
    });
  });

  it('names who has it and offers to wait, once', () => {
    const taken = { kind: 'taken', by, untilMs: 1 } as const;
    expect(noticeOf(null, taken, false)).toMatchObject({ act: 'wait' });
    expect(noticeOf(null, taken, false)?.words).toContain('Petru Salas');
    expect(noticeOf(null, taken, true)).toMatchObject({ act: null });
  });

  it('offers a take that lapsed or came free to be picked up', () => {
    expect(noticeOf(null, { kind: 'lapsed' }, false)?.act).toBe('pick-up');
    expect(noticeOf(null, { kind: 'free' }, false)?.act).toBe('pick-up');
  });
});
