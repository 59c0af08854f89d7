import { describe, expect, it } from 'vitest';
import { ifRangeHolds, noneMatchNames, requestedRange } from './byte-range';

describe('a Range header', () => {
  // RFC 9110 §14.1.2 and §14.4: the examples on 10000 and on 1234 bytes.
  it.each([
    ['bytes=0-499', 10_000, 0, 499],
    ['bytes=500-999', 10_000, 500, 999],
    ['bytes=-500', 10_000, 9500, 9999],
    ['bytes=9500-', 10_000, 9500, 9999],
    ['bytes=500-', 1234, 500, 1233],
    ['bytes=-500', 1234, 734, 1233],
    ['bytes=0-99999', 1234, 0, 1233],
    ['bytes=-99999', 1234, 0, 1233],
    ['BYTES=0-0', 1234, 0, 0],
    ['bytes=0-99999999999999999999999999', 1234, 0, 1233],
  ])('%s of %i bytes is %i to %i', (header, size, start, end) => {
    expect(requestedRange(header, size)).toEqual({ start, end });
  });

  it.each([
    ['bytes=1234-', 1234],
    ['bytes=-0', 1234],
    ['bytes=99999999999999999999999999-', 1234],
    ['bytes=0-', 0],
  ])('%s of %i bytes cannot be satisfied', (header, size) => {
    expect(requestedRange(header, size)).toBe('unsatisfiable');
  });

  it.each(['items=0-5', 'bytes=500-400', 'bytes=a-b', 'bytes=', 'bytes=0-0,-1', undefined])(
    '%s is answered with the whole',
    (header) => {
      expect(requestedRange(header, 1234)).toBe('whole');
    },
  );

  it('has no part of nothing to name', () => {
    expect(requestedRange('bytes=-5', 0)).toBe('whole');
  });
});

describe('the conditions of a request', () => {
  it('If-None-Match compares weakly and takes lists and the star', () => {
    expect(noneMatchNames('"a", W/"b"', '"b"')).toBe(true);
    expect(noneMatchNames('*', '"b"')).toBe(true);
    expect(noneMatchNames('"a"', '"b"')).toBe(false);
    expect(noneMatchNames(undefined, '"b"')).toBe(false);
  });

  it('If-Range compares strongly and holds no date', () => {
    expect(ifRangeHolds(undefined, '"b"')).toBe(true);
    expect(ifRangeHolds('"b"', '"b"')).toBe(true);
    expect(ifRangeHolds('W/"b"', '"b"')).toBe(false);
    expect(ifRangeHolds('Tue, 01 Dec 2026 10:00:00 GMT', '"b"')).toBe(false);
  });
});
