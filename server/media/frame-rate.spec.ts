import { describe, expect, it } from 'vitest';
import { measureTiming, proxyRate } from './frame-rate';

const regular = (frames: number, rate: number, startS = 0) =>
  Array.from({ length: frames }, (_, n) => startS + n / rate);

describe('measuring the rate of pictures', () => {
  it.each([
    [24000, 1001],
    [25, 1],
    [30000, 1001],
    [30, 1],
    [60000, 1001],
    [60, 1],
    [120, 1],
    [240, 1],
  ])('knows %i/%i by its pictures alone', (num, den) => {
    const timing = measureTiming(regular(121, num / den, 5), null, null);
    expect(timing).toMatchObject({ frames: 121, startS: 5, frameRate: { num, den }, variable: false });
    expect(timing?.durationS).toBeCloseTo((121 * den) / num, 6);
  });

  it('knows it where the clock counts in milliseconds', () => {
    const rounded = regular(90, 30).map((time) => Math.round(time * 1000) / 1000);
    expect(measureTiming(rounded, null, { num: 1000, den: 1 })).toMatchObject({
      frameRate: { num: 30, den: 1 },
      variable: false,
    });
  });

  it('believes the header only where the pictures agree with it', () => {
    expect(measureTiming(regular(60, 29.8), null, { num: 149, den: 5 })?.frameRate).toEqual({
      num: 149,
      den: 5,
    });
    expect(measureTiming(regular(60, 25), null, { num: 90000, den: 1 })?.frameRate).toEqual({
      num: 25,
      den: 1,
    });
    expect(measureTiming(regular(60, 17.3), null, null)?.frameRate).toEqual({ num: 173, den: 10 });
  });

  it('is not misled by pictures in coding order or by one that was dropped', () => {
    const shuffled = [0, 3, 1, 2, ...Array.from({ length: 96 }, (_, n) => n + 5)].map((n) => n / 30);
    expect(measureTiming(shuffled, null, null)).toMatchObject({
      frameRate: { num: 30, den: 1 },
      variable: false,
    });
  });

  it('takes the faster pace of an uneven clock', () => {
    const slowThenFast = [...regular(30, 30), ...regular(60, 60, 1)];
    expect(measureTiming(slowThenFast, null, null)).toMatchObject({
      frameRate: { num: 60, den: 1 },
      variable: true,
    });
    const rare = Array.from({ length: 40 }, (_, n) => n / 33 + (n % 3) * 0.012);
    expect(measureTiming(rare, null, null)?.variable).toBe(true);
  });

  it('counts how long the last picture stays, if the file says so and it can be', () => {
    expect(measureTiming([0, 0.1, 0.2], 0.3, null)?.durationS).toBeCloseTo(0.5);
    expect(measureTiming([0, 0.1, 0.2], 3600, null)?.durationS).toBeCloseTo(0.3);
  });

  it.each([[[]], [[1]], [[2, 2, 2]]])('cannot measure %j', (times) => {
    expect(measureTiming(times, null, null)).toBeNull();
  });
});

describe('the rate of the proxy', () => {
  it.each([
    [
      { num: 30000, den: 1001 },
      { num: 30000, den: 1001 },
    ],
    [
      { num: 60, den: 1 },
      { num: 60, den: 1 },
    ],
    [
      { num: 61, den: 1 },
      { num: 61, den: 1 },
    ],
    [
      { num: 240, den: 1 },
      { num: 60, den: 1 },
    ],
    [
      { num: 120000, den: 1001 },
      { num: 60000, den: 1001 },
    ],
    [
      { num: 100, den: 1 },
      { num: 50, den: 1 },
    ],
    [
      { num: 90, den: 1 },
      { num: 45, den: 1 },
    ],
  ])('of %j is %j', (source, proxy) => {
    expect(proxyRate(source)).toEqual(proxy);
  });
});
