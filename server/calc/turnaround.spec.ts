import { DateTime } from 'luxon';
import { describe, expect, it } from 'vitest';
import {
  daySpan,
  promiseKept,
  promiseOf,
  waits,
  wallLength,
  weekMatrix,
  weekStart,
  type WaitedTake,
} from './turnaround';

const HOUR = 3_600_000;
const zone = 'Europe/Stockholm';
const now = new Date('2026-12-04T12:00:00Z');
const hoursAgo = (hours: number) => new Date(now.getTime() - hours * HOUR);

/** A take that waited so many hours; `+` in the published data means that it was not over yet. */
function waited(hours: number, answered: boolean): WaitedTake {
  return {
    submittedAt: hoursAgo(hours),
    outcome: answered ? 'answered' : 'waiting',
    endedAt: answered ? now : null,
    answerBy: hoursAgo(hours - 8),
  };
}

describe('how long takes wait', () => {
  it('counts those that still wait as waiting (Freireich et al. 1963, hours for weeks)', () => {
    const takes = [
      ...[6, 6, 6, 7, 10, 13, 16, 22, 23].map((hours) => waited(hours, true)),
      ...[6, 9, 10, 11, 17, 19, 20, 25, 32, 32, 34, 35].map((hours) => waited(hours, false)),
    ];
    const figures = waits(takes, now, wallLength);
    // The median of the answered ones alone would be 10; R's survival gives 23 with log-log limits 13 and none.
    expect(figures).toMatchObject({
      answered: 9,
      waiting: 12,
      withdrawn: 0,
      median: { hours: 23, low: 13, high: null },
      p90: null,
    });
    expect(figures.steps[0]).toMatchObject({ time: 6, atRisk: 21 });
  });

  it('takes one that was withdrawn as last seen waiting', () => {
    const withdrawn: WaitedTake = { ...waited(10, false), outcome: 'withdrawn', endedAt: hoursAgo(7) };
    const figures = waits([waited(5, true), withdrawn], now, wallLength);
    expect(figures).toMatchObject({ answered: 1, waiting: 0, withdrawn: 1, median: { hours: 5 } });
    // Withdrawn after three hours, it was not at risk any more at five.
    expect(figures.steps[0]?.atRisk).toBe(1);
  });

  it('says nothing of no takes', () => {
    expect(waits([], now, wallLength)).toMatchObject({
      median: { hours: null, low: null, high: null },
      p90: null,
    });
  });
});

describe('the promise', () => {
  it('is kept to the last instant, broken after it, broken by waiting past it, and open before', () => {
    const answeredAt = (late: number): WaitedTake => ({
      submittedAt: hoursAgo(10),
      outcome: 'answered',
      endedAt: new Date(hoursAgo(2).getTime() + late),
      answerBy: hoursAgo(2),
    });
    expect(promiseOf(answeredAt(0), now)).toBe('kept');
    expect(promiseOf(answeredAt(1), now)).toBe('broken');
    expect(promiseOf(waited(9, false), now)).toBe('broken');
    expect(promiseOf(waited(7, false), now)).toBe('undecided');
    expect(promiseOf({ ...waited(9, false), outcome: 'withdrawn', endedAt: now }, now)).toBeNull();
    expect(promiseKept([answeredAt(0), answeredAt(1), waited(9, false), waited(7, false)], now)).toEqual({
      share: 1 / 3,
      kept: 1,
      broken: 2,
      undecided: 1,
    });
    expect(promiseKept([waited(7, false)], now).share).toBeNull();
  });
});

describe('the week', () => {
  it('puts a take into the hour of the gym’s clock in which it was submitted', () => {
    const at = (wall: string) => DateTime.fromISO(wall, { zone }).toJSDate();
    const takes = ['2026-11-30T06:59', '2026-11-30T07:00', '2026-11-29T23:30'].map((wall) => ({
      ...waited(1, false),
      submittedAt: at(wall),
      answerBy: at(wall),
    }));
    const week = weekMatrix(takes, now, zone);
    expect(week.map((day) => day.length)).toEqual(Array(7).fill(24));
    expect(week[0]?.[6]).toEqual({ submitted: 1, broken: 1 });
    expect(week[0]?.[7]).toEqual({ submitted: 1, broken: 1 });
    expect(week[6]?.[23]).toEqual({ submitted: 1, broken: 1 });
    expect(week.flat().reduce((sum, cell) => sum + cell.submitted, 0)).toBe(3);
    expect(weekStart(at('2026-11-29T23:30'), zone)).toBe('2026-11-23');
    expect(weekStart(at('2026-11-30T00:00'), zone)).toBe('2026-11-30');
  });
});

describe('a span of days', () => {
  it('runs from the first midnight to the one after the last day, on the gym’s calendar', () => {
    expect(daySpan('2026-03-28', '2026-03-29', 90, now, zone)).toEqual({
      from: '2026-03-28',
      to: '2026-03-29',
      start: new Date('2026-03-27T23:00:00Z'),
      // Clocks go forward on the 29th.
      end: new Date('2026-03-29T22:00:00Z'),
    });
  });

  it('is the last days up to today when not given', () => {
    expect(daySpan(undefined, undefined, 7, now, zone)).toMatchObject({
      from: '2026-11-28',
      to: '2026-12-04',
    });
  });
});
