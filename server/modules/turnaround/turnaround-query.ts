import type { Database } from '../../platform/database';

/** One submitted take with what the figures are made from. */
export interface TurnaroundRow {
  readonly takeId: string;
  readonly memberId: string;
  readonly liftId: string;
  readonly number: number;
  readonly state: 'processing' | 'waiting' | 'answered' | 'unplayable' | 'withdrawn';
  readonly submittedAt: Date;
  readonly answeredAt: Date | null;
  readonly answeredBy: string | null;
  readonly answerBy: Date;
  /** When the member took it back; null unless withdrawn. */
  readonly withdrawnAt: Date | null;
  readonly hurts: boolean;
}

/** Takes submitted from `from` (inclusive) to `until` (exclusive), oldest first. */
export async function submittedTakes(
  db: Database,
  gymId: string,
  span: { from: Date; until: Date; liftId?: string },
): Promise<TurnaroundRow[]> {
  const query = db('takes')
    .where('takes.gym_id', gymId)
    .andWhere('takes.submitted_at', '>=', span.from)
    .andWhere('takes.submitted_at', '<', span.until)
    .whereNotNull('takes.answer_by')
    .orderBy('takes.submitted_at')
    .orderBy('takes.id')
    .select(
      'takes.id',
      'takes.member_id',
      'takes.lift_id',
      'takes.number',
      'takes.state',
      'takes.submitted_at',
      'takes.answered_at',
      'takes.answered_by',
      'takes.answer_by',
      'takes.queue_rank',
    );
  if (span.liftId !== undefined) query.andWhere('takes.lift_id', span.liftId);
  const rows: {
    id: string;
    member_id: string;
    lift_id: string;
    number: number;
    state: TurnaroundRow['state'];
    submitted_at: Date;
    answered_at: Date | null;
    answered_by: string | null;
    answer_by: Date;
    queue_rank: number;
  }[] = await query;
  const withdrawnAt = await withdrawals(
    db,
    gymId,
    rows.filter((row) => row.state === 'withdrawn').map((row) => row.id),
  );
  return rows.map((row) => ({
    takeId: row.id,
    memberId: row.member_id,
    liftId: row.lift_id,
    number: row.number,
    state: row.state,
    submittedAt: row.submitted_at,
    answeredAt: row.answered_at,
    answeredBy: row.answered_by,
    answerBy: row.answer_by,
    withdrawnAt: withdrawnAt.get(row.id) ?? null,
    hurts: row.queue_rank === 0,
  }));
}

async function withdrawals(
  db: Database,
  gymId: string,
  takeIds: readonly string[],
): Promise<ReadonlyMap<string, Date>> {
  if (takeIds.length === 0) return new Map();
  const rows: { take_id: string; at: Date }[] = await db('events')
    .where({ gym_id: gymId, type: 'take.withdrawn' })
    .whereIn('take_id', takeIds)
    .select('take_id', 'at');
  return new Map(rows.map((row) => [row.take_id, row.at]));
}

export interface FaultCount {
  readonly liftId: string;
  readonly faultId: string;
  readonly name: string;
  readonly seen: number;
  /** Takes on which the fault could be judged: marked clear or seen. */
  readonly marked: number;
}

/** How often each fault was marked on answered takes, by lift, in the order of the lift's list. */
export async function faultCounts(db: Database, gymId: string): Promise<FaultCount[]> {
  const rows: {
    lift_id: string;
    id: string;
    name: string;
    seen: number | string | null;
    marked: number | string | null;
  }[] = await db('lift_faults')
    .leftJoin('marks', (on) =>
      on.on('marks.gym_id', 'lift_faults.gym_id').andOn('marks.fault_id', 'lift_faults.id'),
    )
    .leftJoin('takes', (on) =>
      on
        .on('takes.gym_id', 'marks.gym_id')
        .andOn('takes.id', 'marks.take_id')
        .andOnVal('takes.state', '=', 'answered'),
    )
    .where('lift_faults.gym_id', gymId)
    .whereNull('lift_faults.archived_at')
    .groupBy('lift_faults.lift_id', 'lift_faults.id', 'lift_faults.name', 'lift_faults.position')
    .orderBy('lift_faults.lift_id')
    .orderBy('lift_faults.position')
    .select(
      'lift_faults.lift_id',
      'lift_faults.id',
      'lift_faults.name',
      db.raw("SUM(takes.id IS NOT NULL AND marks.mark = 'seen') AS seen"),
      db.raw("SUM(takes.id IS NOT NULL AND marks.mark IN ('seen', 'clear')) AS marked"),
    );
  return rows.map((row) => ({
    liftId: row.lift_id,
    faultId: row.id,
    name: row.name,
    seen: Number(row.seen ?? 0),
    marked: Number(row.marked ?? 0),
  }));
}

/** Answered takes by lift. */
export async function answeredByLift(db: Database, gymId: string): Promise<ReadonlyMap<string, number>> {
  const rows: { lift_id: string; n: number | string }[] = await db('takes')
    .where({ gym_id: gymId, state: 'answered' })
    .groupBy('lift_id')
    .select('lift_id')
    .count({ n: '*' });
  return new Map(rows.map((row) => [row.lift_id, Number(row.n)]));
}
