import { DateTime } from 'luxon';
import * as z from 'zod';
import type { QueueItemDto } from '../../contract/answers';
import type { AnswerOf, QueryOf } from '../../contract/route';
import type * as boardRoutes from '../../contract/routes/board';
import type { AssignmentDto, TakeDto } from '../../contract/takes';
import { inTransaction } from '../../platform/database';
import { notFound } from '../../platform/errors';
import type { Actor } from '../../platform/http/actor';
import { decodeCursor, encodeCursor } from '../../platform/http/paging';
import type { Platform } from '../../platform/platform';
import { assignmentsByIds } from '../assignments';
import { gymOf } from '../gyms';
import { lockedTake, mayBeSeen, takeDtosByIds } from '../takes';
import { endLease, takeLease } from './leases';
import { queueCounts, queuePlaces, type QueueFilter } from './queue-repository';

export interface QueueService {
  list(
    actor: Actor,
    query: QueryOf<typeof boardRoutes.getQueue>,
  ): Promise<AnswerOf<typeof boardRoutes.getQueue>>;
  pickUp(actor: Actor, takeId: string): Promise<{ until: string }>;
  putBack(actor: Actor, takeId: string): Promise<void>;
}

const Cursor = z.tuple([z.number().int(), z.iso.datetime(), z.string().max(64)]);

function itemOf(take: TakeDto, assignment: AssignmentDto | undefined): QueueItemDto[] {
  if (!take.answerBy) return [];
  return [
    {
      take,
      member: take.member,
      lift: take.lift,
      assignment: { id: take.assignmentId, title: assignment?.title ?? '' },
      posters: take.clips.flatMap((clip) =>
        clip.media ? [{ view: clip.view, url: clip.media.poster }] : [],
      ),
      answerBy: take.answerBy,
      neededBy: take.neededBy,
      atStake: take.atStake,
      pain: take.pain,
      pickedUpBy: take.pickedUpBy,
      number: take.number,
    },
  ];
}

export function createQueue(platform: Platform): QueueService {
  const { database, clock } = platform;

  const filterOf = async (
    gymId: string,
    query: QueryOf<typeof boardRoutes.getQueue>,
    now: Date,
  ): Promise<QueueFilter> => {
    const filter: QueueFilter = { liftId: query.liftId };
    if (query.only === 'second-takes') return { ...filter, secondTakes: true };
    if (query.only === 'nobody-has-it') return { ...filter, freeAt: now };
    if (query.only !== 'needed-today') return filter;
    const { timeZone } = await gymOf(database, gymId);
    const tomorrow = DateTime.fromJSDate(now, { zone: timeZone }).plus({ days: 1 }).startOf('day');
    return { ...filter, neededBefore: tomorrow.toJSDate() };
  };

  return {
    async list(actor, query) {
      const { gymId } = actor;
      const now = clock.now();
      const after = query.cursor === undefined ? null : decodeCursor(query.cursor, Cursor);
      const cursor = after && { rank: after[0], answerBy: new Date(after[1]), id: after[2] };
      const [places, counts] = await Promise.all([
        filterOf(gymId, query, now).then((filter) =>
          queuePlaces(database, gymId, filter, cursor, query.limit + 1),
        ),
        queueCounts(database, gymId),
      ]);
      const page = places.slice(0, query.limit);
      const takes = await takeDtosByIds(
        database,
        gymId,
        page.map((place) => place.id),
        now,
      );
      const assignments = await assignmentsByIds(database, gymId, [
        ...new Set(takes.map((take) => take.assignmentId)),
      ]);
      const last = page.at(-1);
      return {
        items: takes.flatMap((take) => itemOf(take, assignments.get(take.assignmentId))),
        next:
          places.length > page.length && last
            ? encodeCursor([last.rank, last.answerBy.toISOString(), last.id])
            : null,
        ...counts,
      };
    },

    pickUp: (actor, takeId) =>
      inTransaction(database, async (trx) => {
        const now = clock.now();
        const take = await lockedTake(trx, actor.gymId, takeId);
        if (take.state === 'draft') throw notFound('That take');
        await mayBeSeen(trx, actor, take, now);
        return { until: (await takeLease(trx, actor, take, now)).toISOString() };
      }),

    putBack: (actor, takeId) =>
      inTransaction(database, async (trx) => {
        const take = await lockedTake(trx, actor.gymId, takeId);
        if (take.state === 'draft') throw notFound('That take');
        await endLease(trx, actor, take, clock.now());
      }),
  };
}
