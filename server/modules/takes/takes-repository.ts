import type { View } from '../../contract/common';
import type { Pain, TakeState } from '../../contract/takes';
import type { Database, Transaction } from '../../platform/database';
import type { StoredState, TakeRow } from './take-row';

type Db = Database | Transaction;

interface Row {
  id: string;
  gym_id: string;
  assignment_id: string;
  lift_id: string;
  member_id: string;
  number: number;
  previous_take_id: string | null;
  state: StoredState;
  views: View[];
  needed_by: Date | null;
  load: string | null;
  implement: string | null;
  note: string | null;
  pain_where: string | null;
  pain_level: number | null;
  at_stake: number | null;
  queue_rank: number;
  answer_by: Date | null;
  promise_hours: number | null;
  submitted_at: Date | null;
  waiting_at: Date | null;
  answered_at: Date | null;
  answered_by: string | null;
  read_at: Date | null;
  picked_up_by: string | null;
  picked_up_until: Date | null;
  problem_reason: string | null;
  created_at: Date;
}

const toTake = (row: Row): TakeRow => ({
  id: row.id,
  gymId: row.gym_id,
  assignmentId: row.assignment_id,
  liftId: row.lift_id,
  memberId: row.member_id,
  number: row.number,
  previousTakeId: row.previous_take_id,
  state: row.state,
  views: row.views,
  neededBy: row.needed_by,
  load: row.load,
  implement: row.implement,
  note: row.note,
  pain:
    row.pain_where === null || row.pain_level === null
      ? null
      : { where: row.pain_where, level: row.pain_level },
  atStake: row.at_stake,
  queueRank: row.queue_rank,
  answerBy: row.answer_by,
  promiseHours: row.promise_hours,
  submittedAt: row.submitted_at,
  waitingAt: row.waiting_at,
  answeredAt: row.answered_at,
  answeredBy: row.answered_by,
  readAt: row.read_at,
  pickedUpBy: row.picked_up_by,
  pickedUpUntil: row.picked_up_until,
  problemReason: row.problem_reason,
  createdAt: row.created_at,
});

/** What the member says with a take. */
export interface TakeWords {
  readonly neededBy?: Date | null;
  readonly load?: string | null;
  readonly implement?: string | null;
  readonly note?: string | null;
  readonly pain?: Pain | null;
}

/** Columns of the words that were given; what was left out stays as it is. */
function wordColumns(words: TakeWords): Record<string, unknown> {
  const columns: Record<string, unknown> = {};
  if (words.neededBy !== undefined) columns['needed_by'] = words.neededBy;
  if (words.load !== undefined) columns['load'] = words.load;
  if (words.implement !== undefined) columns['implement'] = words.implement;
  if (words.note !== undefined) columns['note'] = words.note;
  if (words.pain !== undefined) {
    columns['pain_where'] = words.pain?.where ?? null;
    columns['pain_level'] = words.pain?.level ?? null;
  }
  return columns;
}

export async function findTake(db: Db, gymId: string, takeId: string): Promise<TakeRow | null> {
  const row: Row | undefined = await db('takes').where({ gym_id: gymId, id: takeId }).first();
  return row ? toTake(row) : null;
}

/** The take, its row held until the transaction ends, which puts all changes of one take in a line. */
export async function lockTake(trx: Transaction, gymId: string, takeId: string): Promise<TakeRow | null> {
  const row: Row | undefined = await trx('takes').where({ gym_id: gymId, id: takeId }).first().forUpdate();
  return row ? toTake(row) : null;
}

export async function findTakes(db: Db, gymId: string, takeIds: readonly string[]): Promise<TakeRow[]> {
  if (takeIds.length === 0) return [];
  const rows: Row[] = await db('takes').where('gym_id', gymId).whereIn('id', takeIds);
  return rows.map(toTake);
}

/** A member's takes of the assignments, oldest first. */
export async function takesOfAssignments(
  db: Db,
  gymId: string,
  memberId: string,
  assignmentIds: readonly string[],
): Promise<TakeRow[]> {
  if (assignmentIds.length === 0) return [];
  const rows: Row[] = await db('takes')
    .where({ gym_id: gymId, member_id: memberId })
    .whereIn('assignment_id', assignmentIds)
    .orderBy('number');
  return rows.map(toTake);
}

export async function insertDraft(
  trx: Transaction,
  take: {
    id: string;
    gymId: string;
    assignmentId: string;
    liftId: string;
    memberId: string;
    number: number;
    previousTakeId: string | null;
    views: readonly View[];
  },
  words: TakeWords,
  now: Date,
): Promise<void> {
  await trx('takes').insert({
    id: take.id,
    gym_id: take.gymId,
    assignment_id: take.assignmentId,
    lift_id: take.liftId,
    member_id: take.memberId,
    number: take.number,
    previous_take_id: take.previousTakeId,
    views: JSON.stringify(take.views),
    state: 'draft',
    created_at: now,
    ...wordColumns(words),
  });
}

const one = (db: Db, gymId: string, takeId: string) => db('takes').where({ gym_id: gymId, id: takeId });

export async function updateWords(trx: Transaction, gymId: string, takeId: string, words: TakeWords) {
  const columns = wordColumns(words);
  if (Object.keys(columns).length > 0) await one(trx, gymId, takeId).update(columns);
}

export async function setSubmitted(
  trx: Transaction,
  gymId: string,
  takeId: string,
  submitted: { answerBy: Date; promiseHours: number; atStake: number | null; queueRank: number; at: Date },
): Promise<void> {
  await one(trx, gymId, takeId).update({
    state: 'processing',
    answer_by: submitted.answerBy,
    promise_hours: submitted.promiseHours,
    at_stake: submitted.atStake,
    queue_rank: submitted.queueRank,
    submitted_at: submitted.at,
    problem_reason: null,
  });
}

export async function setWaiting(trx: Transaction, gymId: string, takeId: string, now: Date): Promise<void> {
  await one(trx, gymId, takeId).update({ state: 'waiting', waiting_at: now });
}

export async function setUnplayable(trx: Transaction, gymId: string, takeId: string, reason: string) {
  await one(trx, gymId, takeId).update({ state: 'unplayable', problem_reason: reason });
}

export async function setProcessingAgain(trx: Transaction, gymId: string, takeId: string): Promise<void> {
  await one(trx, gymId, takeId).update({ state: 'processing', problem_reason: null });
}

export async function setWithdrawn(trx: Transaction, gymId: string, takeId: string): Promise<void> {
  await one(trx, gymId, takeId).update({
    state: 'withdrawn',
    picked_up_by: null,
    picked_up_until: null,
    problem_reason: null,
  });
}

export async function setAnswered(
  trx: Transaction,
  gymId: string,
  takeId: string,
  coachId: string,
  now: Date,
): Promise<void> {
  await one(trx, gymId, takeId).update({
    state: 'answered',
    answered_at: now,
    answered_by: coachId,
    picked_up_by: null,
    picked_up_until: null,
  });
}

/** @returns false when it had been read before */
export async function setRead(trx: Transaction, gymId: string, takeId: string, now: Date): Promise<boolean> {
  return (await one(trx, gymId, takeId).whereNull('read_at').update({ read_at: now })) === 1;
}

export interface TakeFilter {
  readonly memberId?: string;
  readonly liftId?: string;
  readonly state?: TakeState;
  readonly unread?: boolean;
  /** Coaches do not see what was not handed in yet. */
  readonly withoutDrafts: boolean;
}

/**
 * One page of takes, newest first. The index is named because the optimizer would otherwise walk a big gym's
 * rows from the top; `created_at <= ? AND (created_at < ? OR id < ?)` lets it start at the cursor.
 */
export function takesPage(
  db: Database,
  gymId: string,
  filter: TakeFilter,
  after: { at: Date; id: string } | null,
  limit: number,
  now: Date,
) {
  const index = filter.memberId === undefined ? 'takes_list' : 'takes_member';
  const query = db
    .from(db.raw(`takes FORCE INDEX (${index})`))
    .select<Row[]>('*')
    .where('gym_id', gymId)
    .orderBy('created_at', 'desc')
    .orderBy('id', 'desc')
    .limit(limit);
  if (filter.memberId !== undefined) query.andWhere('member_id', filter.memberId);
  if (filter.liftId !== undefined) query.andWhere('lift_id', filter.liftId);
  if (filter.unread !== undefined) {
    query.andWhere('state', 'answered');
    if (filter.unread) query.whereNull('read_at');
    else query.whereNotNull('read_at');
  }
  if (filter.withoutDrafts) query.andWhereNot('state', 'draft');
  if (filter.state === 'picked-up') query.andWhere('state', 'waiting').andWhere('picked_up_until', '>', now);
  else if (filter.state === 'waiting') {
    query
      .andWhere('state', 'waiting')
      .andWhere((free) => void free.whereNull('picked_up_until').orWhere('picked_up_until', '<=', now));
  } else if (filter.state !== undefined) query.andWhere('state', filter.state);
  if (after) {
    query
      .andWhere('created_at', '<=', after.at)
      .andWhere((rest) => void rest.where('created_at', '<', after.at).orWhere('id', '<', after.id));
  }
  return query;
}

export async function listTakes(...args: Parameters<typeof takesPage>): Promise<TakeRow[]> {
  return (await takesPage(...args)).map(toTake);
}

/** A member's handed-in takes, oldest first; of one lift when `liftId` is given. */
export async function handedInTakes(
  db: Db,
  gymId: string,
  memberId: string,
  liftId: string | null = null,
): Promise<TakeRow[]> {
  const query = db('takes')
    .where({ gym_id: gymId, member_id: memberId })
    .whereNotIn('state', ['draft', 'withdrawn'])
    .orderBy('created_at')
    .orderBy('id');
  if (liftId !== null) query.andWhere('lift_id', liftId);
  const rows: Row[] = await query;
  return rows.map(toTake);
}

export interface HistoryRow {
  readonly type: string;
  readonly at: Date;
  readonly actorId: string | null;
}

/** What happened to a take, oldest first; the clips' own progress is left out. */
export async function takeHistory(db: Db, gymId: string, takeId: string): Promise<HistoryRow[]> {
  const rows: { type: string; at: Date; actor_id: string | null }[] = await db('events')
    .where({ gym_id: gymId, take_id: takeId })
    .andWhere('type', 'like', 'take.%')
    .orderBy('id')
    .select('type', 'at', 'actor_id');
  return rows.map((row) => ({ type: row.type, at: row.at, actorId: row.actor_id }));
}

/** Every take of a member, drafts and withdrawn ones too, oldest first. */
export async function allTakesOf(db: Db, gymId: string, memberId: string): Promise<TakeRow[]> {
  const rows: Row[] = await db('takes')
    .where({ gym_id: gymId, member_id: memberId })
    .orderBy('created_at')
    .orderBy('id');
  return rows.map(toTake);
}

/** Deletes a member's takes with all that hangs on them: clips, comments, marks, measures, answers, replies. */
export async function deleteTakesOf(trx: Transaction, gymId: string, memberId: string): Promise<void> {
  const own = () => trx('takes').where({ gym_id: gymId, member_id: memberId });
  // Takes point at their predecessors, so the chain is undone first.
  await own().update({ previous_take_id: null });
  await own().delete();
}
