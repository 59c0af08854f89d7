import * as z from 'zod';
import { Id, text } from './common';

const clock = z
  .string()
  .regex(/^([01]\d|2[0-3]):[0-5]\d$|^24:00$/, 'Write a time as HH:MM, for instance 06:30.');

/** One span of coaching on a weekday, wall-clock times in the gym's zone; `to` is after `from`. */
export const HoursSpan = z
  .object({ from: clock, to: clock })
  .refine((span) => span.from < span.to, { message: 'The end must be after the start.', path: ['to'] });

export const WEEKDAYS = ['mon', 'tue', 'wed', 'thu', 'fri', 'sat', 'sun'] as const;

/** Coaching hours of a week, spans in order for each day; a day without spans is closed. */
export const CoachingHours = z
  .object({
    mon: z.array(HoursSpan).max(4),
    tue: z.array(HoursSpan).max(4),
    wed: z.array(HoursSpan).max(4),
    thu: z.array(HoursSpan).max(4),
    fri: z.array(HoursSpan).max(4),
    sat: z.array(HoursSpan).max(4),
    sun: z.array(HoursSpan).max(4),
  })
  .superRefine((week, ctx) => {
    for (const day of WEEKDAYS) {
      week[day].forEach((span, i) => {
        const before = week[day][i - 1];
        if (before && span.from < before.to) {
          ctx.addIssue({
            code: 'custom',
            path: [day, i, 'from'],
            message: 'Spans of a day must not overlap.',
          });
        }
      });
    }
    if (WEEKDAYS.every((day) => week[day].length === 0)) {
      ctx.addIssue({ code: 'custom', path: [], message: 'Keep at least one span of coaching in the week.' });
    }
  });
export type CoachingHours = z.infer<typeof CoachingHours>;

function isTimeZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}

/** An IANA time zone name, for instance `Europe/Stockholm`. */
export const TimeZone = z
  .string()
  .max(64)
  .refine(isTimeZone, 'Choose a time zone by its IANA name, for instance Europe/Stockholm.');

export const GymDto = z.object({
  id: Id,
  name: z.string(),
  timeZone: z.string(),
  /** The promised turnaround, in coaching hours. */
  promiseHours: z.number(),
  coachingHours: CoachingHours,
  retentionDays: z.number().int(),
  coachesSeeOriginals: z.boolean(),
});
export type GymDto = z.infer<typeof GymDto>;

export const GymChange = z
  .object({
    name: text(80),
    timeZone: TimeZone,
    promiseHours: z.number().min(0.5, 'At least half an hour.').max(200, 'At most 200 hours.'),
    coachingHours: CoachingHours,
    retentionDays: z.number().int().min(30, 'At least 30 days.').max(3650, 'At most ten years.'),
    coachesSeeOriginals: z.boolean(),
  })
  .partial()
  .strict();
export type GymChange = z.infer<typeof GymChange>;
