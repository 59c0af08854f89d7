import fc from 'fast-check';
import { DateTime } from 'luxon';
import { describe, expect, it } from 'vitest';
import { addCoachingMs, coachingMsBetween, type WeekHours } from './hours';

const HOUR = 3_600_000;
const day = [{ from: '06:00', to: '20:00' }];
const week: WeekHours = {
  mon: day,
  tue: day,
  wed: day,
  thu: day,
  fri: day,
  sat: [{ from: '08:00', to: '13:00' }],
  sun: [],
};
const always: WeekHours = Object.fromEntries(
  ['mon', 'tue', 'wed', 'thu', 'fri', 'sat', 'sun'].map((name) => [name, [{ from: '00:00', to: '24:00' }]]),
) as unknown as WeekHours;
const nights: WeekHours = Object.fromEntries(
  ['mon', 'tue', 'wed', 'thu', 'fri', 'sat', 'sun'].map((name) => [
    name,
    [
      { from: '00:30', to: '02:30' },
      { from: '22:00', to: '24:00' },
    ],
  ]),
) as unknown as WeekHours;

const at = (wall: string, zone: string) => DateTime.fromISO(wall, { zone }).toJSDate();
const stockholm = 'Europe/Stockholm';

describe('the coaching-hours clock', () => {
  it('runs only while the gym coaches', () => {
    const friday = at('2026-11-27T18:00', stockholm);
    expect(addCoachingMs(friday, 8 * HOUR, week, stockholm)).toEqual(at('2026-11-30T07:00', stockholm));
    expect(coachingMsBetween(friday, at('2026-11-30T07:00', stockholm), week, stockholm)).toBe(8 * HOUR);
  });

  it('ends a promise with the closing hour rather than at the next opening', () => {
    expect(addCoachingMs(at('2026-12-01T12:00', stockholm), 8 * HOUR, week, stockholm)).toEqual(
      at('2026-12-01T20:00', stockholm),
    );
  });

  it('starts at the next opening when the gym is closed', () => {
    expect(addCoachingMs(at('2026-11-29T12:00', stockholm), HOUR, week, stockholm)).toEqual(
      at('2026-11-30T07:00', stockholm),
    );
  });

  it('counts 24:00 as the end of the day', () => {
    const saturday = at('2026-11-28T23:00', stockholm);
    expect(addCoachingMs(saturday, 2 * HOUR, always, stockholm)).toEqual(at('2026-11-29T01:00', stockholm));
  });

  // Dates of change in 2026: IANA time zone database, as Node's own copy gives them.
  it.each([
    ['Europe/Stockholm', '2026-03-29', '2026-10-25'],
    ['America/New_York', '2026-03-08', '2026-11-01'],
    ['Australia/Lord_Howe', '2026-10-04', '2026-04-05'],
  ])('gives days of %s their real length when clocks change', (zone, forward, back) => {
    const leap = zone === 'Australia/Lord_Howe' ? HOUR / 2 : HOUR;
    const length = (date: string) =>
      coachingMsBetween(
        at(date, zone),
        DateTime.fromISO(date, { zone }).plus({ days: 1 }).toJSDate(),
        always,
        zone,
      );
    expect(length(forward)).toBe(24 * HOUR - leap);
    expect(length(back)).toBe(24 * HOUR + leap);
  });

  it('begins a span that starts in the skipped hour at the leap', () => {
    // New York leaps from 02:00 to 03:00; 00:30 to 02:30 is then an hour and a half.
    const zone = 'America/New_York';
    expect(coachingMsBetween(at('2026-03-08T00:00', zone), at('2026-03-08T12:00', zone), nights, zone)).toBe(
      1.5 * HOUR,
    );
  });

  it('takes a wall-clock time that comes twice for its first coming', () => {
    // New York goes back from 02:00 to 01:00, so 00:30 to 02:30 takes three hours; Stockholm from 03:00 to 02:00,
    // where 02:30 comes first before the change.
    expect(
      coachingMsBetween(
        at('2026-11-01T00:00', 'America/New_York'),
        at('2026-11-01T12:00', 'America/New_York'),
        nights,
        'America/New_York',
      ),
    ).toBe(3 * HOUR);
    expect(
      coachingMsBetween(
        at('2026-10-25T00:00', stockholm),
        at('2026-10-25T12:00', stockholm),
        nights,
        stockholm,
      ),
    ).toBe(2 * HOUR);
  });

  it('refuses a week without hours and a zone that does not exist', () => {
    const closed = Object.fromEntries(Object.keys(week).map((name) => [name, []])) as unknown as WeekHours;
    expect(() => addCoachingMs(new Date(), HOUR, closed, stockholm)).toThrow(RangeError);
    expect(() => addCoachingMs(new Date(), HOUR, week, 'Norrhaven/Quay')).toThrow(RangeError);
  });
});

describe('laws of the coaching-hours clock', () => {
  const zones = fc.constantFrom(
    'Europe/Stockholm',
    'America/New_York',
    'Australia/Lord_Howe',
    'Asia/Kathmandu',
  );
  const weeks = fc.constantFrom(week, always, nights);
  const instants = fc
    .integer({ min: Date.UTC(2026, 0, 1), max: Date.UTC(2027, 0, 1) })
    .map((ms) => new Date(ms));
  const spans = fc.integer({ min: 1, max: 60 * HOUR });

  it('what is added is found between', () => {
    fc.assert(
      fc.property(instants, spans, weeks, zones, (start, ms, hours, zone) => {
        const end = addCoachingMs(start, ms, hours, zone);
        expect(coachingMsBetween(start, end, hours, zone)).toBe(ms);
        // The earliest such instant: one ms sooner is one ms short.
        expect(coachingMsBetween(start, new Date(end.getTime() - 1), hours, zone)).toBe(ms - 1);
      }),
      { numRuns: 60 },
    );
  });

  it('adding in two steps is adding at once', () => {
    fc.assert(
      fc.property(instants, spans, spans, weeks, zones, (start, first, second, hours, zone) => {
        const stepwise = addCoachingMs(addCoachingMs(start, first, hours, zone), second, hours, zone);
        expect(stepwise).toEqual(addCoachingMs(start, first + second, hours, zone));
      }),
      { numRuns: 60 },
    );
  });

  it('coaching time never exceeds the time that passes', () => {
    fc.assert(
      fc.property(instants, instants, weeks, zones, (a, b, hours, zone) => {
        const passed = Math.max(0, b.getTime() - a.getTime());
        const counted = coachingMsBetween(a, b, hours, zone);
        expect(counted).toBeGreaterThanOrEqual(0);
        expect(counted).toBeLessThanOrEqual(passed);
      }),
      { numRuns: 40 },
    );
  });
});
