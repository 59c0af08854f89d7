import { DateTime } from 'luxon';
import { coachingClock } from '../../server/calc/hours';
import type { GymDto } from '../../server/contract';

const HOUR = 3_600_000;

export interface Calendar {
  /** A wall-clock time of the gym so many days ago; a Sunday becomes the Saturday before. */
  daysAgo(days: number, time: string): Date;
  hoursAgo(hours: number): Date;
  /** So many coaching hours after an instant. */
  coachingHoursAfter(at: Date, hours: number): Date;
  /** The latest instant, in whole hours before now, whose promise has run out more than an hour ago. */
  justOverdue(): Date;
}

/** The demo's times, all relative to now, so that it looks the same on every day it is started. */
export function calendarOf(gym: GymDto, now: Date): Calendar {
  const clock = coachingClock(gym.coachingHours, gym.timeZone);
  return {
    daysAgo(days, time) {
      const [hour = 0, minute = 0] = time.split(':').map(Number);
      const day = DateTime.fromJSDate(now, { zone: gym.timeZone }).minus({ days });
      const open = day.weekday === 7 ? day.minus({ days: 1 }) : day;
      return open.set({ hour, minute, second: 0, millisecond: 0 }).toJSDate();
    },
    hoursAgo: (hours) => new Date(now.getTime() - hours * HOUR),
    coachingHoursAfter: (at, hours) => clock.add(at, hours * HOUR),
    justOverdue() {
      for (let hours = 9; hours < 200; hours += 1) {
        const at = new Date(now.getTime() - hours * HOUR);
        if (clock.add(at, gym.promiseHours * HOUR).getTime() < now.getTime() - HOUR) return at;
      }
      throw new Error('the gym has too few coaching hours for an overdue take');
    },
  };
}
