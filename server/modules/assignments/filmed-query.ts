import type { TakeState } from '../../contract';
import type { Database, Transaction } from '../../platform/database';

/** A read of who has filmed what: `takes` belongs to its own domain and is only looked at here. */

const NOT_HANDED_IN = ['draft', 'withdrawn'];

/** How many active members have handed a take in, by assignment. */
export async function filmedCounts(
  db: Database | Transaction,
  gymId: string,
  assignmentIds: readonly string[],
): Promise<Map<string, number>> {
  if (assignmentIds.length === 0) return new Map();
  const rows: { assignment_id: string; n: number }[] = await db('takes')
    .join('users', (on) => on.on('users.gym_id', 'takes.gym_id').andOn('users.id', 'takes.member_id'))
    .where('takes.gym_id', gymId)
    .whereIn('takes.assignment_id', assignmentIds)
    .whereNotIn('takes.state', NOT_HANDED_IN)
    .where({ 'users.active': true, 'users.role': 'member' })
    .groupBy('takes.assignment_id')
    .select('takes.assignment_id')
    .countDistinct({ n: 'takes.member_id' });
  return new Map(rows.map((row) => [row.assignment_id, row.n]));
}

export interface FilmedTake {
  readonly takeId: string;
  readonly memberId: string;
  readonly number: number;
  readonly state: TakeState;
  readonly submittedAt: Date | null;
}

/** The takes handed in for one assignment, in the order of their numbers; a picked-up one says so. */
export async function filmedTakes(
  db: Database | Transaction,
  gymId: string,
  assignmentId: string,
  now: Date,
): Promise<FilmedTake[]> {
  const rows: {
    id: string;
    member_id: string;
    number: number;
    state: TakeState;
    submitted_at: Date | null;
    picked_up_until: Date | null;
  }[] = await db('takes')
    .where({ gym_id: gymId, assignment_id: assignmentId })
    .whereNotIn('state', NOT_HANDED_IN)
    .orderBy('number')
    .select('id', 'member_id', 'number', 'state', 'submitted_at', 'picked_up_until');
  return rows.map((row) => ({
    takeId: row.id,
    memberId: row.member_id,
    number: row.number,
    state:
      row.state === 'waiting' && row.picked_up_until && row.picked_up_until > now ? 'picked-up' : row.state,
    submittedAt: row.submitted_at,
  }));
}
