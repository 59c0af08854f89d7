import { bytesPerSecond, leftWords, timeLeftMs, withSample, type Sample } from './send-rate';

const at = (atMs: number, sentBytes: number): Sample => ({ atMs, sentBytes });

describe('the rate of sending', () => {
  it('is not told before a second has been watched', () => {
    expect(bytesPerSecond([at(0, 0), at(900, 500_000)])).toBeNull();
    expect(timeLeftMs([], 1000)).toBeNull();
  });

  it('is bytes over time', () => {
    expect(bytesPerSecond([at(0, 0), at(2000, 1_000_000)])).toBe(500_000);
  });

  it('is not told while nothing moves', () => {
    expect(bytesPerSecond([at(0, 5000), at(4000, 5000)])).toBeNull();
  });

  it('forgets what is older than its window', () => {
    const slowThenFast = [at(0, 0), at(1000, 100), at(12_000, 1000), at(14_000, 2_001_000)].reduce(
      withSample,
      [],
    );
    expect(slowThenFast[0]).toEqual(at(1000, 100));
    const later = withSample(withSample(slowThenFast, at(21_000, 9_001_000)), at(22_000, 10_001_000));
    expect(bytesPerSecond(later)).toBe(1_000_000);
  });
});

describe('the time left', () => {
  it('is what is left over the rate', () => {
    expect(timeLeftMs([at(0, 0), at(2000, 1_000_000)], 6_000_000)).toBe(10_000);
  });

  it('is never negative', () => {
    expect(timeLeftMs([at(0, 0), at(2000, 1_000_000)], 900_000)).toBe(0);
  });

  it('is said no finer than it is known', () => {
    expect([4_000, 34_000, 89_000, 95_000, 240_000].map(leftWords)).toEqual([
      'a few seconds left',
      'about 30 s left',
      'about 90 s left',
      'about 2 min left',
      'about 4 min left',
    ]);
  });
});
