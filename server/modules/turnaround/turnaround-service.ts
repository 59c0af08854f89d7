import { stringify } from 'csv-stringify/sync';
import type { Person } from '../../contract/common';
import type { GymDto } from '../../contract/gyms';
import type { FaultSummaryDto, TurnaroundDto, TurnaroundQuery } from '../../contract/turnaround';
import { coachingClock } from '../../calc/hours';
import {
  daySpan,
  promiseKept,
  promiseOf,
  waitedHours,
  waits,
  wallLength,
  weekMatrix,
  weekStart,
  type WaitLength,
  type WaitedTake,
} from '../../calc/turnaround';
import { malformed } from '../../platform/errors';
import type { Actor } from '../../platform/http/actor';
import type { Platform } from '../../platform/platform';
import { gymOf } from '../gyms';
import { liftsByIds } from '../lifts';
import { names } from '../people';
import { answeredByLift, faultCounts, submittedTakes, type TurnaroundRow } from './turnaround-query';

/** Days shown when the owner does not choose. */
const DEFAULT_DAYS = 90;
/** A spreadsheet reads a file as UTF-8 by this. */
const BOM = '\uFEFF';

export interface TurnaroundService {
  figures(actor: Actor, query: TurnaroundQuery): Promise<TurnaroundDto>;
  /** The takes behind the figures, as CSV. */
  csv(actor: Actor, query: TurnaroundQuery): Promise<string>;
  faults(actor: Actor): Promise<FaultSummaryDto>;
}

type Row = TurnaroundRow & WaitedTake;

/** A take that could not be played waits for its member, not for a coach, and counts neither way. */
function waitedTakes(rows: readonly TurnaroundRow[], coachId: string | undefined): Row[] {
  return rows
    .filter((row) => row.state !== 'unplayable' && (coachId === undefined || row.answeredBy === coachId))
    .map((row) => {
      const outcome = row.state === 'answered' || row.state === 'withdrawn' ? row.state : 'waiting';
      const endedAt =
        outcome === 'answered'
          ? row.answeredAt
          : outcome === 'withdrawn'
            ? (row.withdrawnAt ?? row.submittedAt)
            : null;
      return { ...row, outcome, endedAt };
    });
}

function groups<K>(rows: readonly Row[], keyOf: (row: Row) => K | null): Map<K, Row[]> {
  const found = new Map<K, Row[]>();
  for (const row of rows) {
    const key = keyOf(row);
    if (key === null) continue;
    const group = found.get(key);
    if (group) group.push(row);
    else found.set(key, [row]);
  }
  return found;
}

export function createTurnaround(platform: Platform): TurnaroundService {
  const { database, clock } = platform;

  const lengthFor = (gym: GymDto, which: TurnaroundQuery['clock']): WaitLength => {
    if (which === 'wall') return wallLength;
    const { between } = coachingClock(gym.coachingHours, gym.timeZone);
    return between;
  };

  const load = async (actor: Actor, query: TurnaroundQuery) => {
    const now = clock.now();
    const gym = await gymOf(database, actor.gymId);
    const span = daySpan(query.from, query.to, DEFAULT_DAYS, now, gym.timeZone);
    if (span.end <= span.start) {
      throw malformed([{ path: 'to', message: 'The last day must not be before the first.' }]);
    }
    const found = await submittedTakes(database, actor.gymId, {
      from: span.start,
      until: span.end,
      liftId: query.liftId,
    });
    const rows = waitedTakes(found, query.coachId);
    const [people, lifts] = await Promise.all([
      names(database, actor.gymId, [
        ...new Set(rows.flatMap((row) => [row.memberId, ...(row.answeredBy ? [row.answeredBy] : [])])),
      ]),
      liftsByIds(database, actor.gymId, [...new Set(rows.map((row) => row.liftId))]),
    ]);
    return {
      now,
      gym,
      span,
      rows,
      length: lengthFor(gym, query.clock),
      person: (id: string): Person => people.get(id) ?? { id, name: '' },
      liftName: (id: string) => lifts.get(id)?.name ?? '',
    };
  };

  return {
    async figures(actor, query) {
      const { now, gym, span, rows, length, person, liftName } = await load(actor, query);
      const all = waits(rows, now, length);
      const group = (of: readonly Row[]) => {
        const figures = waits(of, now, length);
        return {
          answered: figures.answered,
          waiting: figures.waiting,
          medianHours: figures.median.hours,
          kept: promiseKept(of, now),
        };
      };
      const grouped = <K extends string>(keyOf: (row: Row) => K | null) => [...groups(rows, keyOf)];
      return {
        from: span.from,
        to: span.to,
        clock: query.clock,
        answered: all.answered,
        waiting: all.waiting,
        withdrawn: all.withdrawn,
        median: all.median,
        p90: all.p90,
        kept: promiseKept(rows, now),
        curve: all.steps.map((step) => ({
          hours: step.time,
          waitingShare: step.share,
          low: step.low,
          high: step.high,
          atRisk: step.atRisk,
        })),
        byCoach: grouped((row) => row.answeredBy).map(([id, of]) => ({ coach: person(id), ...group(of) })),
        byLift: grouped((row) => row.liftId).map(([id, of]) => ({
          lift: { id, name: liftName(id) },
          ...group(of),
        })),
        byWeek: grouped((row) => weekStart(row.submittedAt, gym.timeZone)).map(([start, of]) => ({
          weekStart: start,
          ...group(of),
        })),
        week: weekMatrix(rows, now, gym.timeZone),
        aging: rows
          .filter((row) => row.outcome === 'waiting')
          .map((row) => ({
            takeId: row.takeId,
            member: person(row.memberId),
            lift: liftName(row.liftId),
            submittedAt: row.submittedAt.toISOString(),
            answerBy: row.answerBy.toISOString(),
            waitedHours: waitedHours(row, now, length),
          })),
      };
    },

    async csv(actor, query) {
      const { now, rows, length, person, liftName } = await load(actor, query);
      const lines = rows.map((row) => ({
        take: row.takeId,
        member: person(row.memberId).name,
        lift: liftName(row.liftId),
        number: row.number,
        state: row.outcome,
        submitted: row.submittedAt.toISOString(),
        answerBy: row.answerBy.toISOString(),
        answered: row.outcome === 'answered' ? (row.answeredAt?.toISOString() ?? '') : '',
        answeredBy: row.answeredBy ? person(row.answeredBy).name : '',
        waitedHours: waitedHours(row, now, length).toFixed(2),
        promise: promiseOf(row, now) ?? '',
        hurts: row.hurts ? 'yes' : 'no',
      }));
      return (
        BOM +
        stringify(lines, {
          header: true,
          columns: [
            'take',
            'member',
            'lift',
            'number',
            'state',
            'submitted',
            'answerBy',
            'answered',
            'answeredBy',
            'waitedHours',
            'promise',
            'hurts',
          ],
          record_delimiter: 'windows',
          escape_formulas: true,
        })
      );
    },

    async faults(actor) {
      const [counts, answered] = await Promise.all([
        faultCounts(database, actor.gymId),
        answeredByLift(database, actor.gymId),
      ]);
      const liftIds = [...new Set(counts.map((count) => count.liftId))];
      const lifts = await liftsByIds(database, actor.gymId, liftIds);
      return {
        lifts: liftIds.map((id) => ({
          lift: { id, name: lifts.get(id)?.name ?? '' },
          takes: answered.get(id) ?? 0,
          faults: counts
            .filter((count) => count.liftId === id)
            .map(({ faultId, name, seen, marked }) => ({ faultId, name, seen, marked })),
        })),
      };
    },
  };
}
