import { CoachingHours, type GymChange, type GymDto } from '../../contract/gyms';
import type { Database, Transaction } from '../../platform/database';

interface GymRow {
  id: string;
  name: string;
  time_zone: string;
  promise_hours: number;
  coaching_hours: unknown;
  retention_days: number;
  coaches_see_originals: 0 | 1;
}

const toGym = (row: GymRow): GymDto => ({
  id: row.id,
  name: row.name,
  timeZone: row.time_zone,
  promiseHours: row.promise_hours,
  coachingHours: CoachingHours.parse(row.coaching_hours),
  retentionDays: row.retention_days,
  coachesSeeOriginals: row.coaches_see_originals === 1,
});

/** The gym, or null; in a transaction `lock` holds its row until the end. */
export async function findGym(
  db: Database | Transaction,
  gymId: string,
  lock = false,
): Promise<GymDto | null> {
  const query = db('gyms').where({ id: gymId });
  const row: GymRow | undefined = await (lock ? query.forUpdate() : query).first();
  return row ? toGym(row) : null;
}

export async function insertGym(db: Database | Transaction, gym: GymDto, now: Date): Promise<void> {
  await db('gyms').insert({
    id: gym.id,
    name: gym.name,
    time_zone: gym.timeZone,
    promise_hours: gym.promiseHours,
    coaching_hours: JSON.stringify(gym.coachingHours),
    retention_days: gym.retentionDays,
    coaches_see_originals: gym.coachesSeeOriginals,
    created_at: now,
  });
}

export async function updateGym(db: Database | Transaction, gymId: string, change: GymChange): Promise<void> {
  await db('gyms')
    .where({ id: gymId })
    .update({
      name: change.name,
      time_zone: change.timeZone,
      promise_hours: change.promiseHours,
      coaching_hours: change.coachingHours && JSON.stringify(change.coachingHours),
      retention_days: change.retentionDays,
      coaches_see_originals: change.coachesSeeOriginals,
    });
}
