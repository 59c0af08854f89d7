import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

/** Where in the queue a page ends. */
export interface QueueCursor {
  readonly rank: number;
  readonly answerBy: Date;
  readonly id: string;
}

export interface QueueFilter {
  readonly liftId?: string;
  /** Only takes needed before this instant. */
  readonly neededBefore?: Date;
  readonly secondTakes?: boolean;
  /** Only takes that nobody holds at this instant. */
  readonly freeAt?: Date;
}

interface PlaceRow {
  id: string;
  queue_rank: number;
  answer_by: Date;
}

/**
 * Places of waiting takes in the order of the queue. The index (gym_id, state, queue_rank, answer_by, id) gives the
 * order without sorting.
 * @param within the rank to stay in and where to go on in it; null for the start of the whole queue
 */
export function placesQuery(
  db: Db,
  gymId: string,
  filter: QueueFilter,
  within: { rank: number; after: QueueCursor | null } | null,
  limit: number,
) {
  const query = db
    .from(db.raw('takes FORCE INDEX (takes_queue)'))
    .select<PlaceRow[]>('id', 'queue_rank', 'answer_by')
    .where('gym_id', gymId)
    .andWhere('state', 'waiting')
    .orderBy('queue_rank')
    .orderBy('answer_by')
    .orderBy('id')
    .limit(limit);
  if (within) query.andWhere('queue_rank', within.rank);
  const after = within?.after;
  if (after) {
    query
      .andWhere('answer_by', '>=', after.answerBy)
      .andWhere((rest) => void rest.where('answer_by', '>', after.answerBy).orWhere('id', '>', after.id));
  }
  const { freeAt } = filter;
  if (filter.liftId !== undefined) query.andWhere('lift_id', filter.liftId);
  if (filter.neededBefore) query.andWhere('needed_by', '<', filter.neededBefore);
  if (filter.secondTakes) query.andWhere('number', '>', 1);
  if (freeAt) {
    query.andWhere((free) => void free.whereNull('picked_up_until').orWhere('picked_up_until', '<=', freeAt));
  }
  return query;
}

/** The ranks in order: something hurts, nothing does. */
const RANKS = [0, 1];

export async function queuePlaces(
  db: Db,
  gymId: string,
  filter: QueueFilter,
  cursor: QueueCursor | null,
  limit: number,
): Promise<QueueCursor[]> {
  const rows: PlaceRow[] = [];
  if (!cursor) rows.push(...(await placesQuery(db, gymId, filter, null, limit)));
  else {
    // One look for each rank left, so that each starts in the index just where it goes on.
    for (const rank of RANKS.filter((value) => value >= cursor.rank)) {
      if (rows.length >= limit) break;
      const after = rank === cursor.rank ? cursor : null;
      rows.push(...(await placesQuery(db, gymId, filter, { rank, after }, limit - rows.length)));
    }
  }
  return rows.map((row) => ({ rank: row.queue_rank, answerBy: row.answer_by, id: row.id }));
}

export interface QueueCounts {
  readonly waiting: number;
  readonly hurting: number;
  readonly unplayable: number;
}

export async function queueCounts(db: Db, gymId: string): Promise<QueueCounts> {
  const rows: { state: string; queue_rank: number; n: number }[] = await db('takes')
    .where('gym_id', gymId)
    .whereIn('state', ['waiting', 'unplayable'])
    .groupBy('state', 'queue_rank')
    .select('state', 'queue_rank')
    .count({ n: '*' });
  const sum = (of: (row: { state: string; queue_rank: number }) => boolean) =>
    rows.filter(of).reduce((total, row) => total + Number(row.n), 0);
  return {
    waiting: sum((row) => row.state === 'waiting'),
    hurting: sum((row) => row.state === 'waiting' && row.queue_rank === 0),
    unplayable: sum((row) => row.state === 'unplayable'),
  };
}

/** Gives the take to a coach until `until`, or to nobody. */
export async function setLease(
  trx: Transaction,
  gymId: string,
  takeId: string,
  lease: { userId: string; until: Date } | null,
): Promise<void> {
  await trx('takes')
    .where({ gym_id: gymId, id: takeId })
    .update({ picked_up_by: lease?.userId ?? null, picked_up_until: lease?.until ?? null });
}

/** Who picked the take up last, unless it was put back since; null when nobody did. */
export async function lastHolder(trx: Transaction, gymId: string, takeId: string): Promise<string | null> {
  const row: { type: string; actor_id: string | null } | undefined = await trx('events')
    .where({ gym_id: gymId, take_id: takeId })
    .whereIn('type', ['take.picked-up', 'take.put-back'])
    .orderBy('id', 'desc')
    .first('type', 'actor_id');
  return row?.type === 'take.picked-up' ? row.actor_id : null;
}

/** Takes of every gym whose lease has run out, oldest first: a look of the machinery, not of a person. */
export async function lapsedLeases(db: Database, now: Date): Promise<{ gymId: string; takeId: string }[]> {
  const rows: { gym_id: string; id: string }[] = await db('takes')
    .where('state', 'waiting')
    .andWhere('picked_up_until', '<=', now)
    .orderBy('picked_up_until')
    .limit(100)
    .select('gym_id', 'id');
  return rows.map((row) => ({ gymId: row.gym_id, takeId: row.id }));
}

/** The waiting takes that a coach has picked up. */
export async function leasesOf(db: Db, gymId: string, userId: string): Promise<string[]> {
  const rows: { id: string }[] = await db('takes')
    .where({ gym_id: gymId, state: 'waiting', picked_up_by: userId })
    .select('id');
  return rows.map((row) => row.id);
}
