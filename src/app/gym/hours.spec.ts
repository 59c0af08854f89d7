import { describe, expect, it } from 'vitest';
import { CoachingHours } from '@contract';
import {
  copied,
  draftOf,
  hoursWords,
  isClosed,
  readClock,
  readWeek,
  spanProblems,
  weekLengthHours,
  withSpan,
} from './hours';

const CLOSED: CoachingHours = { mon: [], tue: [], wed: [], thu: [], fri: [], sat: [], sun: [] };
const USUAL = draftOf({ ...CLOSED, mon: [{ from: '06:00', to: '20:00' }] });

describe('coaching hours', () => {
  it.each([
    ['6', '06:00'],
    ['06', '06:00'],
    ['630', '06:30'],
    ['6.30', '06:30'],
    [' 18:05 ', '18:05'],
    ['24', '24:00'],
    ['0', '00:00'],
    ['', null],
    ['24:30', null],
    ['25', null],
    ['6:60', null],
    ['six', null],
    ['12345', null],
  ])('reads %o as %o', (written, clock) => {
    expect(readClock(written)).toBe(clock);
  });

  it('says beside the span what is wrong with it', () => {
    const problems = spanProblems([
      { from: '6', to: '12' },
      { from: '11:30', to: '11:00' },
      { from: 'x', to: '' },
    ]);
    expect(problems[0]).toEqual({});
    expect(problems[1]?.from).toContain('overlap');
    expect(problems[1]?.to).toContain('after the start');
    expect(problems[2]?.from).toContain('HH:MM');
    expect(problems[2]?.to).toContain('HH:MM');
  });

  it('lets a span begin where the one before ends, and end at midnight', () => {
    expect(
      spanProblems([
        { from: '06:00', to: '12:00' },
        { from: '12:00', to: '24:00' },
      ]),
    ).toEqual([{}, {}]);
  });

  it('sends only hours that the contract takes', () => {
    const hours = readWeek({ ...USUAL, tue: [{ from: '6', to: '24' }] });
    expect(hours?.tue).toEqual([{ from: '06:00', to: '24:00' }]);
    expect(CoachingHours.safeParse(hours).success).toBe(true);
    expect(readWeek({ ...USUAL, tue: [{ from: '8', to: '8' }] })).toBeNull();
    expect(readWeek(draftOf(CLOSED))).toBeNull();
    expect(isClosed(draftOf(CLOSED))).toBe(true);
  });

  it('proposes a span after the last', () => {
    expect(withSpan([])).toEqual([{ from: '08:00', to: '18:00' }]);
    expect(withSpan([{ from: '06:00', to: '12:00' }])[1]).toEqual({ from: '13:00', to: '16:00' });
    expect(withSpan([{ from: '06:00', to: '22:00' }])[1]).toEqual({ from: '23:00', to: '24:00' });
    expect(withSpan([{ from: '06:00', to: '24:00' }])[1]).toEqual({ from: '', to: '' });
  });

  it('copies a day to others and leaves the rest', () => {
    const week = copied(USUAL, 'mon', ['tue', 'sun']);
    expect(week.tue).toEqual(USUAL.mon);
    expect(week.sun).toEqual(USUAL.mon);
    expect(week.wed).toEqual([]);
    expect(weekLengthHours(week)).toBe(42);
  });

  it('counts what can be read, and writes it short', () => {
    expect(weekLengthHours({ ...USUAL, tue: [{ from: '6', to: '' }] })).toBe(14);
    expect(hoursWords(7.5)).toBe('7.5 h');
    expect(hoursWords(20 / 3)).toBe('6.67 h');
  });
});
