import * as z from 'zod';
import { Id, Instant, Person } from './common';
import { CalendarDate } from './people';

export const TurnaroundQuery = z.object({
  /** First day, inclusive, in the gym's zone. */
  from: CalendarDate.optional(),
  /** Last day, inclusive, in the gym's zone. */
  to: CalendarDate.optional(),
  coachId: Id.optional(),
  liftId: Id.optional(),
  clock: z.enum(['wall', 'coaching']).default('wall'),
});
export type TurnaroundQuery = z.infer<typeof TurnaroundQuery>;

const Hours = z.number().nullable();
/** Hours within which half of takes are answered; `low`/`high` are the 95 % limits, null where not reached. */
export const Estimate = z.object({ hours: Hours, low: Hours, high: Hours });
export const KeptShare = z.object({
  /** Of the decided ones, 0 to 1; null when none is decided. */
  share: z.number().nullable(),
  kept: z.number().int(),
  broken: z.number().int(),
  undecided: z.number().int(),
});
const Group = z.object({
  answered: z.number().int(),
  waiting: z.number().int(),
  medianHours: Hours,
  kept: KeptShare,
});

export const TurnaroundDto = z.object({
  from: z.string(),
  to: z.string(),
  clock: z.enum(['wall', 'coaching']),
  answered: z.number().int(),
  waiting: z.number().int(),
  withdrawn: z.number().int(),
  median: Estimate,
  p90: Hours,
  kept: KeptShare,
  /** Kaplan–Meier: share still waiting after so many hours, log-log 95 % limits. */
  curve: z.array(
    z.object({
      hours: z.number(),
      waitingShare: z.number(),
      low: Hours,
      high: Hours,
      atRisk: z.number().int(),
    }),
  ),
  byCoach: z.array(Group.extend({ coach: Person })),
  byLift: z.array(Group.extend({ lift: z.object({ id: Id, name: z.string() }) })),
  byWeek: z.array(Group.extend({ weekStart: z.string() })),
  /** Takes submitted by weekday (Monday first) and hour of the gym's clock. */
  week: z.array(z.array(z.object({ submitted: z.number().int(), broken: z.number().int() }))),
  /** Takes that wait now, oldest first. */
  aging: z.array(
    z.object({
      takeId: Id,
      member: Person,
      lift: z.string(),
      submittedAt: Instant,
      answerBy: Instant,
      waitedHours: z.number(),
    }),
  ),
});
export type TurnaroundDto = z.infer<typeof TurnaroundDto>;

export const FaultSummaryDto = z.object({
  lifts: z.array(
    z.object({
      lift: z.object({ id: Id, name: z.string() }),
      takes: z.number().int(),
      faults: z.array(
        z.object({ faultId: Id, name: z.string(), seen: z.number().int(), marked: z.number().int() }),
      ),
    }),
  ),
});
export type FaultSummaryDto = z.infer<typeof FaultSummaryDto>;
