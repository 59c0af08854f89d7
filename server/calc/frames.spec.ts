import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { frameAtMs, frameOfMediaTime, frameStartMs, seekSeconds } from './frames';

const RATES = [
  { num: 24000, den: 1001 },
  { num: 25, den: 1 },
  { num: 30000, den: 1001 },
  { num: 30, den: 1 },
  { num: 60000, den: 1001 },
  { num: 60, den: 1 },
  { num: 240, den: 1 },
];

describe('frames and instants', () => {
  it('name each other', () => {
    fc.assert(
      fc.property(fc.constantFrom(...RATES), fc.nat(40_000), (fps, n) => {
        expect(frameAtMs(frameStartMs(n, fps), fps)).toBe(n);
        expect(frameOfMediaTime((n * fps.den) / fps.num, fps)).toBe(n);
      }),
    );
  });

  it('an instant within a frame belongs to it', () => {
    expect(frameAtMs(0, { num: 30, den: 1 })).toBe(0);
    expect(frameAtMs(32, { num: 30, den: 1 })).toBe(0);
    expect(frameAtMs(33, { num: 30, den: 1 })).toBe(1);
    expect(frameAtMs(65, { num: 30, den: 1 })).toBe(1);
  });

  it('a seek aims at the middle of the frame', () => {
    expect(seekSeconds(0, { num: 30, den: 1 })).toBeCloseTo(1 / 60, 12);
    fc.assert(
      fc.property(fc.constantFrom(...RATES), fc.nat(40_000), (fps, n) => {
        const seconds = seekSeconds(n, fps);
        expect(seconds).toBeGreaterThan((n * fps.den) / fps.num);
        expect(seconds).toBeLessThan(((n + 1) * fps.den) / fps.num);
      }),
    );
  });
});
