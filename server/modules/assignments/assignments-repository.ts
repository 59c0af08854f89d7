import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

export interface AssignmentRow {
  readonly id: string;
  readonly liftId: string;
  readonly title: string;
  readonly note: string | null;
  readonly load: string | null;
  readonly reps: number | null;
  readonly rounds: number | null;
  readonly trainAt: Date | null;
  readonly untilAnsweredScaleId: string | null;
  readonly forAll: boolean;
  readonly createdBy: string;
  readonly createdAt: Date;
  readonly closedAt: Date | null;
}

interface Row {
  id: string;
  lift_id: string;
  title: string;
  note: string | null;
  load: string | null;
  reps: number | null;
  rounds: number | null;
  train_at: Date | null;
  until_answered_scale_id: string | null;
  for_all: 0 | 1;
  created_by: string;
  created_at: Date;
  closed_at: Date | null;
}

const toAssignment = (row: Row): AssignmentRow => ({
  id: row.id,
  liftId: row.lift_id,
  title: row.title,
  note: row.note,
  load: row.load,
  reps: row.reps,
  rounds: row.rounds,
  trainAt: row.train_at,
  untilAnsweredScaleId: row.until_answered_scale_id,
  forAll: row.for_all === 1,
  createdBy: row.created_by,
  createdAt: row.created_at,
  closedAt: row.closed_at,
});

export async function findAssignments(
  db: Db,
  gymId: string,
  ids: readonly string[],
): Promise<AssignmentRow[]> {
  if (ids.length === 0) return [];
  const rows: Row[] = await db('assignments').where('gym_id', gymId).whereIn('id', ids);
  return rows.map(toAssignment);
}

/** The assignment, its row held until the transaction ends. */
export async function lockAssignment(
  trx: Transaction,
  gymId: string,
  id: string,
): Promise<AssignmentRow | null> {
  const row: Row | undefined = await trx('assignments').where({ gym_id: gymId, id }).first().forUpdate();
  return row ? toAssignment(row) : null;
}

/**
 * Assignments, newest first, after a place in the list.
 * @param openFor only what is open and asked of this member
 */
export async function listAssignments(
  db: Db,
  gymId: string,
  openFor: string | null,
  after: { readonly at: Date; readonly id: string } | null,
  limit: number,
): Promise<AssignmentRow[]> {
  const query = db('assignments').where('gym_id', gymId);
  if (openFor !== null) {
    query
      .whereNull('closed_at')
      .andWhere((asked) =>
        asked
          .where('for_all', true)
          .orWhereIn(
            'id',
            db('assignment_members').where({ gym_id: gymId, member_id: openFor }).select('assignment_id'),
          ),
      );
  }
  if (after) {
    query.andWhere((later) =>
      later
        .where('created_at', '<', after.at)
        .orWhere((same) => same.where('created_at', after.at).andWhere('id', '<', after.id)),
    );
  }
  const rows: Row[] = await query
    .orderBy([
      { column: 'created_at', order: 'desc' },
      { column: 'id', order: 'desc' },
    ])
    .limit(limit);
  return rows.map(toAssignment);
}

/** The members named by each assignment that does not ask everyone. */
export async function namedMembers(
  db: Db,
  gymId: string,
  ids: readonly string[],
): Promise<Map<string, string[]>> {
  const named = new Map<string, string[]>();
  if (ids.length === 0) return named;
  const rows: { assignment_id: string; member_id: string }[] = await db('assignment_members')
    .where('gym_id', gymId)
    .whereIn('assignment_id', ids)
    .orderBy('member_id')
    .select('assignment_id', 'member_id');
  for (const row of rows) {
    const members = named.get(row.assignment_id) ?? [];
    members.push(row.member_id);
    named.set(row.assignment_id, members);
  }
  return named;
}

export async function insertAssignment(
  trx: Transaction,
  gymId: string,
  assignment: AssignmentRow,
  memberIds: readonly string[],
): Promise<void> {
  await trx('assignments').insert({
    id: assignment.id,
    gym_id: gymId,
    lift_id: assignment.liftId,
    title: assignment.title,
    note: assignment.note,
    load: assignment.load,
    reps: assignment.reps,
    rounds: assignment.rounds,
    train_at: assignment.trainAt,
    until_answered_scale_id: assignment.untilAnsweredScaleId,
    for_all: assignment.forAll,
    created_by: assignment.createdBy,
    created_at: assignment.createdAt,
    closed_at: assignment.closedAt,
  });
  if (memberIds.length === 0) return;
  await trx('assignment_members').insert(
    memberIds.map((memberId) => ({ assignment_id: assignment.id, gym_id: gymId, member_id: memberId })),
  );
}

export async function setClosed(
  trx: Transaction,
  gymId: string,
  id: string,
  closedAt: Date | null,
): Promise<void> {
  await trx('assignments').where({ gym_id: gymId, id }).update({ closed_at: closedAt });
}
