import { describe, expect, it } from 'vitest';
import { correctDrift } from './drift';

const FRAME_60 = 1000 / 60;

describe('drift of a player from the clock', () => {
  it('is left alone within half a frame', () => {
    expect(correctDrift(8, FRAME_60)).toEqual({ kind: 'none' });
    expect(correctDrift(-8, FRAME_60)).toEqual({ kind: 'none' });
    expect(correctDrift(16, 1000 / 30)).toEqual({ kind: 'none' });
  });

  it('is run off by five per cent up to 150 ms', () => {
    expect(correctDrift(9, FRAME_60)).toEqual({ kind: 'rate', factor: 0.95 });
    expect(correctDrift(-9, FRAME_60)).toEqual({ kind: 'rate', factor: 1.05 });
    expect(correctDrift(150, FRAME_60)).toEqual({ kind: 'rate', factor: 0.95 });
  });

  it('is jumped over beyond that', () => {
    expect(correctDrift(151, FRAME_60)).toEqual({ kind: 'seek' });
    expect(correctDrift(-400, FRAME_60)).toEqual({ kind: 'seek' });
  });
});
