import { IANAZone } from 'luxon';

const WEEKDAYS = ['mon', 'tue', 'wed', 'thu', 'fri', 'sat', 'sun'] as const;

/** Open spans of each weekday, `HH:MM` on the gym's wall clock, in order; `24:00` is the end of the day. */
export type WeekHours = Readonly<
  Record<(typeof WEEKDAYS)[number], readonly { readonly from: string; readonly to: string }[]>
>;

const MINUTE = 60_000;
const DAY = 86_400_000;

interface Span {
  readonly start: number;
  readonly end: number;
}

/** Counts time only while the gym coaches. Instants are Dates, lengths milliseconds that really pass. */
export interface CoachingClock {
  /** The earliest instant by which `ms` of coaching time have passed since `start`. */
  add(start: Date, ms: number): Date;
  /** Coaching time from `a` to `b`; 0 when `b` is not after `a`. */
  between(a: Date, b: Date): number;
}

const minutesOf = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

/**
 * The instant at which the zone's wall clock shows `wall` (written as if it were UTC, ms). A time that comes twice
 * (clocks go back) is its first coming; a time that never comes (clocks go forward) is the instant of the leap.
 */
function instantOf(wall: number, zone: IANAZone): number {
  const before = zone.offset(wall - DAY) * MINUTE;
  const after = zone.offset(wall + DAY) * MINUTE;
  const candidates = [wall - before, wall - after].filter((at) => at + zone.offset(at) * MINUTE === wall);
  if (candidates.length > 0) return Math.min(...candidates);
  // In a gap: the old offset holds at `low`, the new one at `high`; find where it changes.
  let low = wall - Math.max(before, after);
  let high = wall - Math.min(before, after);
  const old = zone.offset(low);
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (zone.offset(middle) === old) low = middle;
    else high = middle;
  }
  return high;
}

/** Number of days since 1970-01-01 of the zone's calendar date at an instant. */
const dayOf = (at: number, zone: IANAZone): number => Math.floor((at + zone.offset(at) * MINUTE) / DAY);

/** 1970-01-01 was a Thursday. */
const weekdayOf = (day: number) => WEEKDAYS[(((day + 3) % 7) + 7) % 7] ?? 'mon';

/**
 * A clock that runs in the gym's coaching hours. Days on which clocks change are as long as they really are.
 * @param zone IANA name
 * @throws RangeError when the zone is unknown or the week has no open span
 */
export function coachingClock(week: WeekHours, zone: string): CoachingClock {
  const iana = IANAZone.create(zone);
  if (!iana.isValid) throw new RangeError(`unknown time zone ${zone}`);
  if (WEEKDAYS.every((weekday) => week[weekday].length === 0)) throw new RangeError('the gym never coaches');
  const known = new Map<number, readonly Span[]>();
  const spansOf = (day: number): readonly Span[] => {
    let spans = known.get(day);
    if (!spans) {
      spans = week[weekdayOf(day)]
        .map(({ from, to }) => ({
          start: instantOf(day * DAY + minutesOf(from) * MINUTE, iana),
          end: instantOf(day * DAY + minutesOf(to) * MINUTE, iana),
        }))
        .filter((span) => span.end > span.start);
      known.set(day, spans);
    }
    return spans;
  };
  return {
    add(start, ms) {
      const from = start.getTime();
      if (ms <= 0) return start;
      let left = ms;
      for (let day = dayOf(from, iana); ; day += 1) {
        for (const span of spansOf(day)) {
          const begin = Math.max(span.start, from);
          const length = span.end - begin;
          if (length <= 0) continue;
          if (length >= left) return new Date(begin + left);
          left -= length;
        }
      }
    },
    between(a, b) {
      const from = a.getTime();
      const until = b.getTime();
      let sum = 0;
      for (let day = dayOf(from, iana); day <= dayOf(until, iana); day += 1) {
        for (const span of spansOf(day)) {
          sum += Math.max(0, Math.min(span.end, until) - Math.max(span.start, from));
        }
      }
      return sum;
    },
  };
}

/** See {@link CoachingClock.add}. */
export const addCoachingMs = (start: Date, ms: number, week: WeekHours, zone: string): Date =>
  coachingClock(week, zone).add(start, ms);

/** See {@link CoachingClock.between}. */
export const coachingMsBetween = (a: Date, b: Date, week: WeekHours, zone: string): number =>
  coachingClock(week, zone).between(a, b);
