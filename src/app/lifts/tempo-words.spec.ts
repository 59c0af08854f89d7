import { describe, expect, it } from 'vitest';
import { tempoWords } from './tempo-words';

describe('a tempo in words', () => {
  it.each([
    [
      '30X1',
      '3 s down, no pause at the bottom, up as fast as you can control, 1 s at the top; 4 s a rep and the way up',
    ],
    ['10-0-2-0', '10 s down, no pause at the bottom, 2 s up, no pause at the top; 12 s a rep'],
    ['0201', 'down without counting, 2 s at the bottom, up without counting, 1 s at the top; 3 s a rep'],
    [
      ' 40x0 ',
      '4 s down, no pause at the bottom, up as fast as you can control, no pause at the top; 4 s a rep and the way up',
    ],
  ])('reads %s', (written, words) => {
    expect(tempoWords(written)).toBe(words);
  });

  it.each(['', '301', 'X010', 'slow'])('has no words for "%s"', (written) => {
    expect(tempoWords(written)).toBeNull();
  });
});
