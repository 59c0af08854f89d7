import { describe, expect, it } from 'vitest';
import { railPercent, railTicks } from './rail-scale';

describe('the rail', () => {
  it('places instants by their share of the length and never outside', () => {
    expect(railPercent(1500, 6000)).toBe(25);
    expect(railPercent(9000, 6000)).toBe(100);
    expect(railPercent(-5, 6000)).toBe(0);
    expect(railPercent(10, 0)).toBe(0);
  });

  it('has at most eleven lines, at round seconds', () => {
    expect(railTicks(4200)).toEqual([0, 500, 1000, 1500, 2000, 2500, 3000, 3500, 4000]);
    expect(railTicks(6000).at(1)).toBe(1000);
    expect(railTicks(118_000).length).toBeLessThanOrEqual(11);
    expect(railTicks(0)).toEqual([]);
  });
});
