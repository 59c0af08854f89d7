import type { UserDto } from '../../contract';
import { inTransaction, type Transaction } from '../../platform/database';
import { conflict, notFound, refused } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import type { Platform } from '../../platform/platform';
import { gymOf } from '../gyms';
import { endAllSessions } from '../sessions';
import { listOpen, type Invitation } from './invitations-repository';
import * as repository from './people-repository';

export interface PeopleDeps {
  /** Returns to the queue what a person has picked up, in the caller's transaction. */
  putBackAll(trx: Transaction, gymId: string, userId: string, now: Date): Promise<void>;
}

export interface People {
  list(actor: Actor): Promise<{ items: UserDto[]; invitations: Invitation[] }>;
  change(
    actor: Actor,
    userId: string,
    change: { role?: UserDto['role']; active?: boolean },
  ): Promise<UserDto>;
  recordConsent(actor: Actor, userId: string, guardianName: string): Promise<UserDto>;
}

/** @throws AppError 409 when nobody else could run the gym; its row must be held by the transaction */
export async function mustNotBeLastOwner(trx: Transaction, gymId: string, userId: string): Promise<void> {
  if ((await repository.countOtherOwners(trx, gymId, userId)) > 0) return;
  throw conflict('last-owner', 'A gym needs an active owner. Make somebody else an owner first.');
}

export function createPeople(platform: Platform, deps: PeopleDeps): People {
  const { database, clock } = platform;

  const changed = async (trx: Transaction, actor: Actor, userId: string, now: Date): Promise<UserDto> => {
    await recordEvent(
      trx,
      { gymId: actor.gymId, type: 'people.changed', actorId: actor.userId, to: { staff: true, userId } },
      now,
    );
    const user = await repository.findUser(trx, actor.gymId, userId, now);
    if (!user) throw notFound('That person');
    return user;
  };

  return {
    async list(actor) {
      const now = clock.now();
      const [items, invitations] = await Promise.all([
        repository.listUsers(database, actor.gymId, now),
        listOpen(database, actor.gymId, now),
      ]);
      return { items, invitations };
    },

    change: (actor, userId, change) =>
      inTransaction(database, async (trx) => {
        const now = clock.now();
        // Holding the gym's row puts two such changes in a line, so that no two owners leave at once.
        await gymOf(trx, actor.gymId, true);
        const user = await repository.findUser(trx, actor.gymId, userId, now);
        if (!user) throw notFound('That person');
        const leavesOwnership =
          user.role === 'owner' && (change.active === false || (change.role ?? 'owner') !== 'owner');
        if (leavesOwnership) await mustNotBeLastOwner(trx, actor.gymId, userId);
        await repository.updateUser(trx, actor.gymId, userId, change);
        if (change.active === false) await endAllSessions(trx, actor.gymId, userId, now);
        if (change.active === false || change.role === 'member')
          await deps.putBackAll(trx, actor.gymId, userId, now);
        return changed(trx, actor, userId, now);
      }),

    recordConsent: (actor, userId, guardianName) =>
      inTransaction(database, async (trx) => {
        const now = clock.now();
        const user = await repository.findUser(trx, actor.gymId, userId, now);
        if (!user) throw notFound('That person');
        if (user.role !== 'member') throw refused('not-a-member', 'Consent is recorded for members.');
        await repository.setGuardianConsent(
          trx,
          actor.gymId,
          userId,
          { guardianName, recordedBy: actor.userId },
          now,
        );
        return changed(trx, actor, userId, now);
      }),
  };
}
