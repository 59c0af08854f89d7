import { DateTime } from 'luxon';
import { kaplanMeier, quantile, type SurvivalStep } from './survival';

const HOUR = 3_600_000;

/** One submitted take as the figures see it. */
export interface WaitedTake {
  readonly submittedAt: Date;
  /** `waiting` from submission on, until answered or taken back. */
  readonly outcome: 'answered' | 'waiting' | 'withdrawn';
  /** When it was answered or taken back; null while it waits. */
  readonly endedAt: Date | null;
  readonly answerBy: Date;
}

export interface PromiseKept {
  /** kept ÷ (kept + broken); null when none is decided. */
  readonly share: number | null;
  readonly kept: number;
  readonly broken: number;
  /** Still waiting, and still in time. */
  readonly undecided: number;
}

/** Length of a wait, ms, on the clock that was chosen. */
export type WaitLength = (from: Date, to: Date) => number;

/** Time that passes, whether the gym coaches or not. */
export const wallLength: WaitLength = (from, to) => Math.max(0, to.getTime() - from.getTime());

/** What became of the promise: null for a take that was taken back, which nobody can keep or break. */
export function promiseOf(take: WaitedTake, now: Date): 'kept' | 'broken' | 'undecided' | null {
  if (take.outcome === 'withdrawn') return null;
  if (take.outcome === 'answered' && take.endedAt) return take.endedAt <= take.answerBy ? 'kept' : 'broken';
  return now <= take.answerBy ? 'undecided' : 'broken';
}

/** Whether the promise was kept; a take that waits past its answer-by is broken already. */
export function promiseKept(takes: readonly WaitedTake[], now: Date): PromiseKept {
  const count = { kept: 0, broken: 0, undecided: 0 };
  for (const take of takes) {
    const fate = promiseOf(take, now);
    if (fate) count[fate] += 1;
  }
  const decided = count.kept + count.broken;
  return { share: decided === 0 ? null : count.kept / decided, ...count };
}

/** Hours a take has waited, to its end or until now. */
export const waitedHours = (take: WaitedTake, now: Date, length: WaitLength): number =>
  length(take.submittedAt, take.endedAt ?? now) / HOUR;

export interface Waits {
  readonly answered: number;
  readonly waiting: number;
  readonly withdrawn: number;
  /** Hours by which half were answered, with 95 % limits (log-log); null where not reached. */
  readonly median: {
    readonly hours: number | null;
    readonly low: number | null;
    readonly high: number | null;
  };
  /** Hours by which nine of ten were answered. */
  readonly p90: number | null;
  readonly steps: readonly SurvivalStep[];
}

/**
 * How long takes wait for their answer, with those that still wait (or were taken back) as censored: leaving them out
 * would make a slow gym look fast.
 */
export function waits(takes: readonly WaitedTake[], now: Date, length: WaitLength): Waits {
  const curve = kaplanMeier(
    takes.map((take) => ({ time: waitedHours(take, now, length), event: take.outcome === 'answered' })),
  );
  const { time, low, high } = quantile(curve, 0.5);
  const of = (outcome: WaitedTake['outcome']) => takes.filter((take) => take.outcome === outcome).length;
  return {
    answered: of('answered'),
    waiting: of('waiting'),
    withdrawn: of('withdrawn'),
    median: { hours: time, low, high },
    p90: quantile(curve, 0.9).time,
    steps: curve.steps,
  };
}

export interface HourCell {
  submitted: number;
  broken: number;
}

/** Takes submitted in each hour of the week on the zone's wall clock: 7 days, Monday first, of 24 hours. */
export function weekMatrix(takes: readonly WaitedTake[], now: Date, zone: string): HourCell[][] {
  const week = Array.from({ length: 7 }, () =>
    Array.from({ length: 24 }, (): HourCell => ({ submitted: 0, broken: 0 })),
  );
  for (const take of takes) {
    const local = DateTime.fromJSDate(take.submittedAt, { zone });
    const cell = week[local.weekday - 1]?.[local.hour];
    if (!cell) continue;
    cell.submitted += 1;
    if (promiseOf(take, now) === 'broken') cell.broken += 1;
  }
  return week;
}

/** The Monday, `YYYY-MM-DD`, of the week in which an instant falls on the zone's calendar. */
export function weekStart(at: Date, zone: string): string {
  return DateTime.fromJSDate(at, { zone }).startOf('week').toFormat('yyyy-MM-dd');
}

/**
 * The days from `from` to `to`, both inclusive, as instants of the zone: start of the first, start of the day after
 * the last. Without them the last `days` days up to today.
 */
export function daySpan(
  from: string | undefined,
  to: string | undefined,
  days: number,
  now: Date,
  zone: string,
): { from: string; to: string; start: Date; end: Date } {
  const last = to === undefined ? DateTime.fromJSDate(now, { zone }) : DateTime.fromISO(to, { zone });
  const first = from === undefined ? last.minus({ days: days - 1 }) : DateTime.fromISO(from, { zone });
  return {
    from: first.toFormat('yyyy-MM-dd'),
    to: last.toFormat('yyyy-MM-dd'),
    start: first.startOf('day').toJSDate(),
    end: last.startOf('day').plus({ days: 1 }).toJSDate(),
  };
}
