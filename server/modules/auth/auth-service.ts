import type { ParsedBodyOf, SessionDto, accountRoutes } from '../../contract';
import { inTransaction, isDuplicate, type Database, type Transaction } from '../../platform/database';
import { AppError, conflict, malformed, notSignedIn } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import type { SessionTokens } from '../../platform/http/cookies';
import { createRateLimit } from '../../platform/http/rate-limits';
import { hashSecret, newId, newSecret } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import { addGym, gymOf } from '../gyms';
import { mails, sendMailLater } from '../notices';
import {
  credentialsByEmail,
  emailIsTaken,
  findUser,
  insertUser,
  mustBeGoodPassword,
  passwordHashOf,
  updateUser,
} from '../people';
import { endAllSessions, type Sessions } from '../sessions';
import {
  findResetToken,
  insertResetToken,
  spendResetTokens,
  type ResetToken,
} from './reset-tokens-repository';

/** Where a call comes from. */
export interface Caller {
  readonly ip: string;
  readonly device: string;
}

export interface SignedIn {
  readonly session: SessionDto;
  readonly tokens: SessionTokens;
}

export interface Auth {
  openGym(opening: ParsedBodyOf<typeof accountRoutes.openGym>, caller: Caller): Promise<SignedIn>;
  signIn(given: { email: string; password: string }, caller: Caller): Promise<SignedIn>;
  forgot(email: string, caller: Caller): Promise<void>;
  reset(token: string, password: string, caller: Caller): Promise<void>;
  me(actor: Actor): Promise<SessionDto>;
  changeMe(actor: Actor, change: ParsedBodyOf<typeof accountRoutes.changeMe>): Promise<SessionDto>;
}

/** A mailed link to choose a new password works this long, ms. */
const RESET_MS = 3600_000;

const wrongPair = () =>
  new AppError(
    401,
    'wrong-sign-in',
    'The address or the password is not right. Try again, or choose a new password.',
  );

export function createAuth(platform: Platform, sessions: Sessions): Auth {
  const { database, clock, config, passwords } = platform;
  // Slows guessing down without ever locking an account out.
  const perAccount = createRateLimit(database, 'sign-in', 5, 60);
  const perAddress = createRateLimit(database, 'sign-in-ip', 20, 60);
  const openings = createRateLimit(database, 'open-gym', 10, 3600);
  const resets = createRateLimit(database, 'reset', 10, 3600);

  const sessionOf = async (
    db: Database | Transaction,
    gymId: string,
    userId: string,
  ): Promise<SessionDto> => {
    const [user, gym] = await Promise.all([findUser(db, gymId, userId, clock.now()), gymOf(db, gymId)]);
    if (!user) throw notSignedIn();
    return { user, gym };
  };

  const mustWork = (token: ResetToken | null, now: Date): ResetToken => {
    if (!token) {
      throw new AppError(
        410,
        'reset-unknown',
        'This link is not known. Open the newest mail, or ask for a new link.',
      );
    }
    if (token.usedAt) {
      throw new AppError(
        410,
        'reset-used',
        'This link was used or replaced. Open the newest mail, or ask for a new link.',
      );
    }
    if (token.expiresAt <= now) {
      throw new AppError(410, 'reset-expired', 'This link is older than one hour. Ask for a new one.');
    }
    return token;
  };

  return {
    async openGym(opening, caller) {
      await openings.consume(caller.ip);
      mustBeGoodPassword(opening.password, [opening.gymName, opening.name, opening.email]);
      const taken = () =>
        conflict(
          'email-taken',
          'This address already has an account. Sign in with it, or use another address.',
        );
      const email = opening.email.toLowerCase();
      if (await emailIsTaken(database, email)) throw taken();
      const passwordHash = await passwords.hash(opening.password);
      try {
        return await inTransaction(database, async (trx) => {
          const now = clock.now();
          const gym = await addGym(trx, { name: opening.gymName, timeZone: opening.timeZone }, now);
          const id = newId();
          await insertUser(
            trx,
            { id, gymId: gym.id, name: opening.name, email, role: 'owner', passwordHash, bornOn: null },
            now,
          );
          return {
            session: await sessionOf(trx, gym.id, id),
            tokens: await sessions.start(trx, { gymId: gym.id, id }, caller.device),
          };
        });
      } catch (error) {
        if (isDuplicate(error)) throw taken();
        throw error;
      }
    },

    async signIn(given, caller) {
      const account = hashSecret(given.email.trim().toLowerCase()).toString('hex');
      await perAddress.consume(caller.ip);
      await perAccount.consume(account);
      const found = await credentialsByEmail(database, given.email);
      const matches = await passwords.verify(found?.passwordHash ?? null, given.password);
      if (!found || !matches) throw wrongPair();
      await perAccount.reset(account);
      return inTransaction(database, async (trx) => ({
        session: await sessionOf(trx, found.gymId, found.userId),
        tokens: await sessions.start(trx, { gymId: found.gymId, id: found.userId }, caller.device),
      }));
    },

    async forgot(email, caller) {
      await resets.consume(caller.ip);
      const found = await credentialsByEmail(database, email);
      if (!found) return;
      const token = newSecret();
      await inTransaction(database, async (trx) => {
        const now = clock.now();
        await insertResetToken(
          trx,
          {
            tokenHash: hashSecret(token),
            gymId: found.gymId,
            userId: found.userId,
            expiresAt: new Date(now.getTime() + RESET_MS),
          },
          now,
        );
        const link = `${config.publicUrl}/reset/${token}`;
        await sendMailLater(trx, found.email, mails.resetPassword({ name: found.name, link }), now);
      });
    },

    async reset(token, password, caller) {
      await resets.consume(caller.ip);
      const tokenHash = hashSecret(token);
      const offered = mustWork(await findResetToken(database, tokenHash), clock.now());
      const { user, gym } = await sessionOf(database, offered.gymId, offered.userId);
      mustBeGoodPassword(password, [gym.name, user.name, user.email]);
      const passwordHash = await passwords.hash(password);
      await inTransaction(database, async (trx) => {
        const now = clock.now();
        const { gymId, userId } = mustWork(await findResetToken(trx, tokenHash, true), now);
        await updateUser(trx, gymId, userId, { passwordHash });
        await spendResetTokens(trx, gymId, userId, now);
        await endAllSessions(trx, gymId, userId, now);
      });
    },

    me: (actor) => sessionOf(database, actor.gymId, actor.userId),

    async changeMe(actor, change) {
      const { gymId, userId } = actor;
      let passwordHash: string | undefined;
      if (change.password !== undefined) {
        await perAccount.consume(userId);
        const stored = await passwordHashOf(database, gymId, userId);
        if (!(await passwords.verify(stored, change.currentPassword ?? ''))) {
          throw malformed([{ path: 'currentPassword', message: 'This is not your present password.' }]);
        }
        await perAccount.reset(userId);
        const { user, gym } = await sessionOf(database, gymId, userId);
        mustBeGoodPassword(change.password, [gym.name, user.name, user.email]);
        passwordHash = await passwords.hash(change.password);
      }
      return inTransaction(database, async (trx) => {
        const now = clock.now();
        await updateUser(trx, gymId, userId, { name: change.name, kit: change.kit, passwordHash });
        if (passwordHash) {
          await spendResetTokens(trx, gymId, userId, now);
          await endAllSessions(trx, gymId, userId, now, actor.sessionId);
        }
        await recordEvent(
          trx,
          { gymId, type: 'people.changed', actorId: userId, to: { staff: true, userId } },
          now,
        );
        return sessionOf(trx, gymId, userId);
      });
    },
  };
}
