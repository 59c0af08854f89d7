import { describe, expect, it } from 'vitest';
import { frameSpoken, frameWords, speedWords } from './frame-words';

const FPS_60 = { num: 60, den: 1 };

describe('an instant in words', () => {
  it('has the time to the ms and the frame', () => {
    expect(frameWords(2917, FPS_60)).toBe('0:02.917 · frame 175');
    expect(frameWords(0, FPS_60)).toBe('0:00.000 · frame 0');
  });

  it('is spoken in seconds', () => {
    expect(frameSpoken(2917, FPS_60)).toBe('2.917 seconds, frame 175');
  });

  it('names the speeds', () => {
    expect(speedWords(0.25)).toBe('quarter speed');
  });
});
