import { inTransaction } from '../../platform/database';
import { malformed, notSignedIn } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { createRateLimit } from '../../platform/http/rate-limits';
import { enqueueJob } from '../../platform/jobs';
import type { Platform } from '../../platform/platform';
import { gymOf } from '../gyms';
import { forgetNotices } from '../notices';
import { anonymiseUser, deleteInvitations, findUser, mustNotBeLastOwner, passwordHashOf } from '../people';
import { deleteSessions } from '../sessions';
import { allTakesOf, deleteTakesOf } from '../takes';
import type { PrivacyDeps } from './privacy-deps';
import { forgetAnswers, noteErasure } from './privacy-repository';

export interface Erasure {
  /** Erases the actor: their clips, takes and words; what a coach answered stays with the members it is for. */
  erase(actor: Actor, password: string): Promise<void>;
}

export function createErasure(platform: Platform, deps: PrivacyDeps): Erasure {
  const { database, clock, passwords } = platform;
  const tries = createRateLimit(database, 'erase', 5, 60);
  return {
    async erase(actor, password) {
      const { gymId, userId } = actor;
      await tries.consume(userId);
      if (!(await passwords.verify(await passwordHashOf(database, gymId, userId), password))) {
        throw malformed([{ path: 'password', message: 'This is not your password.' }]);
      }
      await inTransaction(database, async (trx) => {
        const now = clock.now();
        // Holding the gym's row puts such changes in a line, so that no two owners leave at once.
        await gymOf(trx, gymId, true);
        const user = await findUser(trx, gymId, userId, now);
        if (!user) throw notSignedIn();
        if (user.role === 'owner') await mustNotBeLastOwner(trx, gymId, userId);
        await deps.putBackAll(trx, gymId, userId, now);
        const takeIds = (await allTakesOf(trx, gymId, userId)).map((take) => take.id);
        await forgetNotices(trx, gymId, { userId, email: user.email, takeIds });
        await deleteTakesOf(trx, gymId, userId);
        await deleteInvitations(trx, gymId, user.email);
        await deleteSessions(trx, gymId, userId);
        await forgetAnswers(trx, userId);
        await anonymiseUser(
          trx,
          gymId,
          userId,
          user.role === 'member' ? 'Former member' : 'Former coach',
          now,
        );
        await noteErasure(trx, gymId, userId, now);
        if (takeIds.length > 0) {
          await enqueueJob(
            trx,
            'objects.delete',
            { prefixes: takeIds.map((id) => `gyms/${gymId}/takes/${id}/`) },
            now,
            { maxAttempts: 20 },
          );
        }
        await recordEvent(trx, { gymId, type: 'people.changed', actorId: userId, to: { staff: true } }, now);
      });
    },
  };
}
