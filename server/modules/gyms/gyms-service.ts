import type { CoachingHours, GymChange, GymDto } from '../../contract/gyms';
import { inTransaction, type Database, type Transaction } from '../../platform/database';
import { notFound } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { newId } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import { findGym, insertGym, updateGym } from './gyms-repository';

/** What a gym begins with, until its owner says otherwise (common practice of small gyms, no source). */
const weekday = [{ from: '06:00', to: '20:00' }];
const FIRST_HOURS: CoachingHours = {
  mon: weekday,
  tue: weekday,
  wed: weekday,
  thu: weekday,
  fri: weekday,
  sat: [{ from: '08:00', to: '13:00' }],
  sun: [],
};
const FIRST_PROMISE_HOURS = 8;
const FIRST_RETENTION_DAYS = 365;

/**
 * The gym with its promise; in a transaction `lock` holds its row, which puts changes of the gym in a line.
 * @throws AppError 404
 */
export async function gymOf(db: Database | Transaction, gymId: string, lock = false): Promise<GymDto> {
  const gym = await findGym(db, gymId, lock);
  if (!gym) throw notFound('That gym');
  return gym;
}

/** Opens a gym with the first coaching hours and promise, in the caller's transaction. */
export async function addGym(
  trx: Transaction,
  gym: { name: string; timeZone: string },
  now: Date,
): Promise<GymDto> {
  const opened: GymDto = {
    id: newId(),
    name: gym.name,
    timeZone: gym.timeZone,
    promiseHours: FIRST_PROMISE_HOURS,
    coachingHours: FIRST_HOURS,
    retentionDays: FIRST_RETENTION_DAYS,
    coachesSeeOriginals: false,
  };
  await insertGym(trx, opened, now);
  return opened;
}

export interface GymsService {
  get(actor: Actor): Promise<GymDto>;
  change(actor: Actor, change: GymChange): Promise<GymDto>;
}

export function createGyms(platform: Platform): GymsService {
  const { database, clock } = platform;
  return {
    get: (actor) => gymOf(database, actor.gymId),
    change: (actor, change) =>
      inTransaction(database, async (trx) => {
        if (Object.values(change).some((value) => value !== undefined)) {
          await updateGym(trx, actor.gymId, change);
          await recordEvent(
            trx,
            {
              gymId: actor.gymId,
              type: 'gym.changed',
              actorId: actor.userId,
              to: { staff: true, all: true },
            },
            clock.now(),
          );
        }
        return gymOf(trx, actor.gymId);
      }),
  };
}
