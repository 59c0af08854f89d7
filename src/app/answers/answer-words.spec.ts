import type { CommentDto } from '@contract';
import { againWords, callWords, historyLine, inTime, measureValue, measureWords } from './answer-words';

const comment = (id: string, atMs: number, view: 'front' | 'side'): CommentDto => ({
  id,
  takeId: 'take',
  clipId: view,
  view,
  atMs,
  endMs: null,
  body: '',
  drawing: null,
  faultId: null,
  author: { id: 'coach', name: 'Maren Oduya' },
  createdAt: '2026-12-01T12:00:00.000Z',
});

describe('the call in words', () => {
  it('says what to do with the load', () => {
    expect(callWords({ call: 'go', scale: null })).toBe('Go as planned');
    expect(callWords({ call: 'light', scale: null })).toBe('Keep it light');
    expect(callWords({ call: 'scale', scale: { id: 's', name: 'Swing to the shoulder', note: '' } })).toBe(
      'Use: Swing to the shoulder',
    );
  });
});

describe('a measure', () => {
  it('is shown in whole degrees with a ± that is rounded up and never 0', () => {
    expect(measureValue({ kind: 'angle', value: 111.6, plusMinus: 2.2 })).toBe('112° ± 3');
    expect(measureValue({ kind: 'angle', value: 90, plusMinus: 0.2 })).toBe('90° ± 1');
  });

  it('tells its side in words instead of by a sign', () => {
    expect(measureValue({ kind: 'lean', value: -12.4, plusMinus: 3 })).toBe('12° ± 3');
    expect(measureWords({ kind: 'lean', value: -12.4 })).toBe('lean, to the left of the picture');
    expect(measureWords({ kind: 'lean', value: 12.4 })).toBe('lean, to the right of the picture');
    expect(measureWords({ kind: 'depth', value: 5 })).toBe('hip below the knee');
    expect(measureWords({ kind: 'depth', value: -5 })).toBe('hip above the knee');
    expect(measureWords({ kind: 'depth', value: 0.3 })).toBe('thigh level');
  });
});

describe('comments', () => {
  it('stand in the order in which they happen', () => {
    const rows = [comment('c', 3400, 'side'), comment('b', 2900, 'side'), comment('a', 2900, 'front')];
    expect(inTime(rows).map(({ id }) => id)).toEqual(['a', 'b', 'c']);
  });
});

describe('the way to the next take', () => {
  it('names the view when only one of two is asked', () => {
    expect(againWords(['side'], ['front', 'side'])).toBe('Film it again, side only');
    expect(againWords(['front', 'side'], ['front', 'side'])).toBe('Film it again, the front and the side');
    expect(againWords(['side'], ['side'])).toBe('Film it again');
  });
});

describe('the history of a take', () => {
  it('names the coach, leaves out what no member cares for and says a step once', () => {
    const maren = { id: 'coach', name: 'Maren Oduya' };
    const amara = { id: 'member', name: 'Amara Holmqvist' };
    expect(
      historyLine([
        { type: 'take.created', at: '1', by: amara },
        { type: 'take.submitted', at: '2', by: amara },
        { type: 'clip.ready', at: '3', by: null },
        { type: 'take.picked-up', at: '4', by: maren },
        { type: 'take.picked-up', at: '5', by: maren },
        { type: 'take.answered', at: '6', by: maren },
      ]),
    ).toEqual([
      { at: '2', words: 'sent' },
      { at: '4', words: 'picked up by Maren' },
      { at: '6', words: 'answered by Maren' },
    ]);
  });
});
