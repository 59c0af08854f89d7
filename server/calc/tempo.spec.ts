import { describe, expect, it } from 'vitest';
import { cadencePerMinute, formatTempo, parseTempo, repTimings, secondsPerRep } from './tempo';

describe('a written tempo', () => {
  it('is read as down, bottom, up, top', () => {
    expect(parseTempo('40X0')).toEqual({ downS: 4, bottomS: 0, upS: 'X', topS: 0 });
    expect(parseTempo('10-0-2-0')).toEqual({ downS: 10, bottomS: 0, upS: 2, topS: 0 });
    expect(parseTempo('4-0-X-1')).toEqual({ downS: 4, bottomS: 0, upS: 'X', topS: 1 });
  });

  it.each(['301', '30100', 'X010', '-3010', '3-0-1', '30x0', '4 0 X 0', ''])(
    'is refused: "%s"',
    (written) => {
      expect(parseTempo(written)).toBeNull();
    },
  );

  it.each(['3010', '40X0', '10-0-2-0', '31X1'])('is written as it was read: %s', (written) => {
    const tempo = parseTempo(written);
    expect(tempo && formatTempo(tempo)).toBe(written);
  });

  // Arithmetic of the notation as trade pages print it: seconds of a set with X as nothing, and as one second.
  it.each([
    ['3010', 5, 20, 20],
    ['4010', 8, 40, 40],
    ['2020', 3, 12, 12],
    ['2011', 10, 40, 40],
    ['40X0', 6, 24, 30],
    ['31X1', 6, 30, 36],
  ])('%s for %i reps takes %i s, or %i s if X takes one', (written, reps, shortest, withX) => {
    const tempo = parseTempo(written);
    if (!tempo) throw new Error('not read');
    expect(reps * secondsPerRep(tempo, 0)).toBe(shortest);
    expect(reps * secondsPerRep(tempo, 1)).toBe(withX);
  });
});

describe('timing of reps from marked instants', () => {
  it('counts reps that start at the top, sharing the top between two', () => {
    const marks = [0, 2000, 4000, 5000, 5600].map((atMs, i) => ({
      atMs,
      kind: i % 2 === 0 ? ('top' as const) : ('bottom' as const),
    }));
    expect(repTimings(marks)).toEqual([
      { rep: 1, startMs: 0, downMs: 2000, upMs: 2000 },
      { rep: 2, startMs: 4000, downMs: 1000, upMs: 600 },
    ]);
  });

  it('counts reps that start at the bottom', () => {
    expect(
      repTimings([
        { atMs: 100, kind: 'bottom' },
        { atMs: 700, kind: 'top' },
        { atMs: 1700, kind: 'bottom' },
      ]),
    ).toEqual([{ rep: 1, startMs: 100, downMs: 1000, upMs: 600 }]);
  });

  it('leaves a pause between two marks of one kind out of both phases, in whatever order they come', () => {
    expect(
      repTimings([
        { atMs: 5000, kind: 'top' },
        { atMs: 0, kind: 'top' },
        { atMs: 3000, kind: 'bottom' },
        { atMs: 4000, kind: 'bottom' },
      ]),
    ).toEqual([{ rep: 1, startMs: 0, downMs: 3000, upMs: 1000 }]);
  });

  it('has nothing to say of half a rep', () => {
    expect(
      repTimings([
        { atMs: 0, kind: 'top' },
        { atMs: 900, kind: 'bottom' },
      ]),
    ).toEqual([]);
  });
});

describe('cadence', () => {
  it('counts the spaces between reps, not the reps', () => {
    // Constructed: three reps 1.6 s apart are 37.5 a minute.
    expect(cadencePerMinute([0, 1600, 3200])).toBeCloseTo(37.5, 9);
    // Wesley & Kivi (2017): 40 swings a minute are 1.5 s apart.
    expect(cadencePerMinute([0, 1500])).toBeCloseTo(40, 9);
  });

  it('cannot be told from one rep', () => {
    expect(cadencePerMinute([500])).toBeNull();
    expect(cadencePerMinute([])).toBeNull();
  });
});
