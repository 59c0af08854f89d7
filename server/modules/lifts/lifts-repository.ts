import { BriefDto, type FaultDto, type LiftDto, type Pattern, type ScaleDto } from '../../contract';
import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

interface LiftRow {
  id: string;
  name: string;
  pattern: Pattern;
  brief: unknown;
  tempo: string | null;
  created_at: Date;
  archived_at: Date | null;
}

/** Lifts by id with their faults and scales; those taken off the list only when `withArchived`. */
export async function findLifts(
  db: Db,
  gymId: string,
  ids: readonly string[] | null,
  withArchived: boolean,
): Promise<LiftDto[]> {
  const query = db('lifts').where({ gym_id: gymId }).orderBy('name').orderBy('id');
  if (ids) query.whereIn('id', [...ids]);
  const rows: LiftRow[] = await query;
  const parts = <T>(table: string): Promise<(T & { lift_id: string })[]> => {
    const found = db(table)
      .where({ gym_id: gymId })
      .whereIn(
        'lift_id',
        rows.map((row) => row.id),
      )
      .orderBy('position');
    return withArchived ? found : found.whereNull('archived_at');
  };
  const [faults, scales] = await Promise.all([
    parts<FaultDto>('lift_faults'),
    parts<ScaleDto>('lift_scales'),
  ]);
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    pattern: row.pattern,
    brief: BriefDto.parse(row.brief),
    tempo: row.tempo,
    faults: faults
      .filter((fault) => fault.lift_id === row.id)
      .map(({ id, name, phase, view, cue, drill }) => ({ id, name, phase, view, cue, drill })),
    scales: scales
      .filter((scale) => scale.lift_id === row.id)
      .map(({ id, name, level, note }) => ({ id, name, level, note })),
    createdAt: row.created_at.toISOString(),
    archivedAt: row.archived_at?.toISOString() ?? null,
  }));
}

/** Whether another lift on the list has this name. */
export async function nameIsTaken(
  db: Db,
  gymId: string,
  name: string,
  except: string | null,
): Promise<boolean> {
  const query = db('lifts').where({ gym_id: gymId, name }).whereNull('archived_at');
  if (except) query.andWhereNot('id', except);
  return (await query.first('id')) !== undefined;
}

export interface LiftColumns {
  readonly name?: string;
  readonly pattern?: Pattern;
  readonly brief?: LiftDto['brief'];
  readonly tempo?: string | null;
  readonly archivedAt?: Date | null;
}

const columnsOf = (lift: LiftColumns) => ({
  name: lift.name,
  pattern: lift.pattern,
  brief: lift.brief && JSON.stringify(lift.brief),
  tempo: lift.tempo,
  archived_at: lift.archivedAt,
});

export async function insertLift(
  trx: Transaction,
  gymId: string,
  id: string,
  lift: LiftColumns,
  now: Date,
): Promise<void> {
  await trx('lifts').insert({ id, gym_id: gymId, ...columnsOf(lift), created_at: now });
}

export async function updateLift(
  trx: Transaction,
  gymId: string,
  id: string,
  lift: LiftColumns,
): Promise<void> {
  await trx('lifts')
    .where({ gym_id: gymId, id })
    .update({ ...columnsOf(lift), gym_id: gymId });
}

/** Keeps the named parts in the given order, adds new ones, and takes what is left out off the list. */
export async function putParts(
  trx: Transaction,
  table: 'lift_faults' | 'lift_scales',
  gymId: string,
  liftId: string,
  parts: readonly {
    readonly id: string;
    readonly isNew: boolean;
    readonly columns: Record<string, unknown>;
  }[],
  now: Date,
): Promise<void> {
  await trx(table)
    .where({ gym_id: gymId, lift_id: liftId })
    .whereNotIn(
      'id',
      parts.map((part) => part.id),
    )
    .whereNull('archived_at')
    .update({ archived_at: now });
  for (const [position, { id, isNew, columns }] of parts.entries()) {
    if (isNew) await trx(table).insert({ id, gym_id: gymId, lift_id: liftId, position, ...columns });
    else
      await trx(table)
        .where({ gym_id: gymId, lift_id: liftId, id })
        .update({ position, archived_at: null, ...columns });
  }
}
