import { describe, expect, it } from 'vitest';
import type { TurnaroundDto } from '@contract';
import {
  cautions,
  curveWords,
  keptCell,
  keptRange,
  lengthWords,
  medianRange,
  percentWords,
  standWords,
  weekBlocks,
  weekWords,
} from './turnaround-words';

const aged = (waitedHours: number): TurnaroundDto['aging'][number] => ({
  takeId: `t${waitedHours}`,
  member: { id: 'm', name: 'Tove' },
  lift: 'Goblet squat',
  submittedAt: '2026-12-01T08:00:00.000Z',
  answerBy: '2026-12-01T16:00:00.000Z',
  waitedHours,
});

function figures(change: Partial<TurnaroundDto> = {}): TurnaroundDto {
  return {
    from: '2026-09-03',
    to: '2026-12-01',
    clock: 'wall',
    answered: 100,
    waiting: 4,
    withdrawn: 0,
    median: { hours: 5 + 1 / 6, low: 4, high: 7 },
    p90: 12,
    kept: { share: 0.91, kept: 91, broken: 9, undecided: 4 },
    curve: [],
    byCoach: [],
    byLift: [],
    byWeek: [],
    week: [],
    aging: [aged(6), aged(1), aged(2), aged(0.5)],
    ...change,
  };
}

describe('the words of turnaround', () => {
  it('says how things stand in a sentence', () => {
    expect(standWords(figures())).toBe(
      'Half of members hear within 5 h 10 min; the promise was kept for 91 %; 4 are waiting, the oldest 6 h.',
    );
  });

  it('says counts where they are small, and leaves out a promise nobody could keep yet', () => {
    const kept = { share: 5 / 6, kept: 5, broken: 1, undecided: 0 };
    expect(standWords(figures({ answered: 6, kept, waiting: 0, aging: [] }))).toBe(
      'Half of members hear within 5 h 10 min; the promise was kept 5 of 6 times; nobody is waiting.',
    );
    const none = figures({
      answered: 0,
      waiting: 1,
      median: { hours: null, low: null, high: null },
      kept: { share: null, kept: 0, broken: 0, undecided: 1 },
      aging: [aged(2)],
    });
    expect(standWords(none)).toBe('Nobody has had an answer yet; 1 is waiting, for 2 h.');
  });

  it('does not invent a middle', () => {
    const none = figures({ answered: 2, median: { hours: null, low: 3, high: null } });
    expect(standWords(none)).toContain('Fewer than half have had an answer so far');
    expect(medianRange(none)).toBe('3 h or more');
    expect(cautions(none, false).join(' ')).toContain('no middle');
  });

  it('warns of small numbers, of one coach alone, and of takes taken back', () => {
    expect(cautions(figures(), false)).toEqual([]);
    expect(cautions(figures({ answered: 3 }), false)[0]).toContain('Only 3 takes have');
    expect(cautions(figures(), true)[0]).toContain('nobody’s yet');
    expect(cautions(figures({ withdrawn: 1 }), false)[0]).toContain('1 take was taken back');
  });

  it('never rounds an exception away', () => {
    expect(percentWords(0.999)).toBe('over 99 %');
    expect(percentWords(0.001)).toBe('under 1 %');
    expect(percentWords(1)).toBe('100 %');
    expect(percentWords(0)).toBe('0 %');
  });

  it('tells the promise by counts or by share', () => {
    expect(keptCell({ share: null, kept: 0, broken: 0, undecided: 3 })).toBe('–');
    expect(keptCell({ share: 0.5, kept: 2, broken: 2, undecided: 0 })).toBe('2 of 4');
    expect(keptCell({ share: 0.9, kept: 18, broken: 2, undecided: 0 })).toBe('90 % (18 of 20)');
  });

  it('gives the share’s range by the score interval', () => {
    // By hand from the formula for 8 of 10: 0.490 to 0.943.
    expect(keptRange({ share: 0.8, kept: 8, broken: 2, undecided: 0 })).toBe('49 to 94 %');
    expect(keptRange({ share: 1, kept: 3, broken: 0, undecided: 0 })).toBe('44 to 100 %');
    expect(keptRange({ share: null, kept: 0, broken: 0, undecided: 0 })).toBeNull();
  });

  it('tells the curve in words', () => {
    const step = (hours: number, waitingShare: number) => ({
      hours,
      waitingShare,
      low: null,
      high: null,
      atRisk: 4,
    });
    expect(curveWords([step(0.5, 0.75), step(3, 0.5), step(9, 0)])).toBe(
      'The share that has an answer, by hours since it was sent: 25 % within 1 h, 50 % within 4 h, 50 % within 8 h.',
    );
    expect(curveWords([])).toBe('The share that has an answer, by hours since it was sent.');
  });

  it('sums hours to blocks of four', () => {
    const day = Array.from({ length: 24 }, (_hour, h) => ({
      submitted: h < 5 ? 1 : 0,
      broken: h === 4 ? 1 : 0,
    }));
    expect(weekBlocks([day])[0]?.slice(0, 3)).toEqual([
      { submitted: 4, broken: 0 },
      { submitted: 1, broken: 1 },
      { submitted: 0, broken: 0 },
    ]);
  });

  it('writes lengths and weeks as they are said', () => {
    expect(lengthWords(0.5)).toBe('30 min');
    expect(lengthWords(1.9999)).toBe('2 h');
    expect(weekWords('2026-11-23')).toBe('23–29 Nov');
    expect(weekWords('2026-11-30')).toBe('30 Nov–6 Dec');
  });
});
