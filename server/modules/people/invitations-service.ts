import type { InvitationDto, Role, SessionDto } from '../../contract';
import { inTransaction, isDuplicate } from '../../platform/database';
import { AppError, conflict, forbidden, notFound } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import type { SessionTokens } from '../../platform/http/cookies';
import { hashSecret, newId, newSecret } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import { gymOf } from '../gyms';
import { mails, sendMailLater } from '../notices';
import type { Sessions } from '../sessions';
import * as repository from './invitations-repository';
import { mustBeGoodPassword } from './password-rules';
import { emailIsTaken, findUser, insertUser } from './people-repository';

const VALID_MS = 7 * 24 * 3600_000;

export interface Invitations {
  invite(actor: Actor, invitee: { email: string; name: string; role: Role }): Promise<InvitationDto>;
  withdraw(actor: Actor, id: string): Promise<void>;
  open(token: string): Promise<InvitationDto>;
  accept(
    token: string,
    given: { password: string; bornOn?: string },
    device: string,
  ): Promise<{ session: SessionDto; tokens: SessionTokens }>;
}

const taken = () =>
  conflict('email-taken', 'This address already has an account. Sign in with it, or use another address.');

function mustBeOpen(invitation: repository.Invitation | null, now: Date): repository.Invitation {
  if (!invitation) throw notFound('That invitation');
  if (invitation.acceptedAt)
    throw new AppError(
      410,
      'invitation-used',
      'This invitation was accepted already. Sign in with your password.',
    );
  if (invitation.withdrawn)
    throw new AppError(
      410,
      'invitation-withdrawn',
      'This invitation was replaced or withdrawn. Use the newest mail, or ask your gym for a new one.',
    );
  if (new Date(invitation.expiresAt) <= now)
    throw new AppError(
      410,
      'invitation-expired',
      'This invitation is older than seven days. Ask your gym for a new one.',
    );
  return invitation;
}

export function createInvitations(platform: Platform, sessions: Sessions): Invitations {
  const { database, clock, config, passwords } = platform;
  return {
    async invite(actor, invitee) {
      if (actor.role === 'coach' && invitee.role !== 'member') {
        throw forbidden('A coach can invite members. Ask the owner to invite coaches.');
      }
      const email = invitee.email.toLowerCase();
      const token = newSecret();
      return inTransaction(database, async (trx) => {
        const now = clock.now();
        if (await emailIsTaken(trx, email)) throw taken();
        await repository.withdrawOpen(trx, actor.gymId, { email }, now);
        const row = {
          id: newId(),
          gymId: actor.gymId,
          tokenHash: hashSecret(token),
          email,
          name: invitee.name,
          role: invitee.role,
          invitedBy: actor.userId,
          expiresAt: new Date(now.getTime() + VALID_MS),
        };
        await repository.insertInvitation(trx, row, now);
        const gym = await gymOf(trx, actor.gymId);
        const link = `${config.publicUrl}/invitation/${token}`;
        const mail = mails.invitation({
          gymName: gym.name,
          invitedBy: actor.name,
          name: invitee.name,
          role: invitee.role,
          link,
        });
        await sendMailLater(trx, email, mail, now);
        await recordEvent(
          trx,
          { gymId: actor.gymId, type: 'people.changed', actorId: actor.userId, to: { staff: true } },
          now,
        );
        return {
          ...row,
          gymName: gym.name,
          invitedBy: actor.name,
          createdAt: now.toISOString(),
          expiresAt: row.expiresAt.toISOString(),
          acceptedAt: null,
        };
      });
    },

    async withdraw(actor, id) {
      const now = clock.now();
      if ((await repository.withdrawOpen(database, actor.gymId, { id }, now)) === 0)
        throw notFound('That invitation');
      await recordEvent(
        database,
        { gymId: actor.gymId, type: 'people.changed', actorId: actor.userId, to: { staff: true } },
        now,
      );
    },

    async open(token) {
      return mustBeOpen(await repository.findByToken(database, hashSecret(token)), clock.now());
    },

    async accept(token, given, device) {
      const now = clock.now();
      const offered = mustBeOpen(await repository.findByToken(database, hashSecret(token)), now);
      mustBeGoodPassword(given.password, [offered.gymName, offered.name, offered.email]);
      const passwordHash = await passwords.hash(given.password);
      try {
        return await inTransaction(database, async (trx) => {
          const invitation = mustBeOpen(await repository.findByToken(trx, hashSecret(token), true), now);
          const { gymId } = invitation;
          const id = newId();
          await insertUser(
            trx,
            {
              id,
              gymId,
              name: invitation.name,
              email: invitation.email,
              role: invitation.role,
              passwordHash,
              bornOn: given.bornOn ?? null,
            },
            now,
          );
          await repository.setAccepted(trx, gymId, invitation.id, now);
          await recordEvent(trx, { gymId, type: 'people.changed', actorId: id, to: { staff: true } }, now);
          const [user, gym] = [await findUser(trx, gymId, id, now), await gymOf(trx, gymId)];
          if (!user) throw new Error('a person that was just added is not there');
          return { session: { user, gym }, tokens: await sessions.start(trx, { gymId, id }, device) };
        });
      } catch (error) {
        if (isDuplicate(error)) throw taken();
        throw error;
      }
    },
  };
}
