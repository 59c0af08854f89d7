import { ACCESS_SECONDS, readAccessToken, signAccessToken } from '../../platform/access-token';
import { inTransaction, type Database, type Transaction } from '../../platform/database';
import { notFound, notSignedIn } from '../../platform/errors';
import type { Actor, Authenticate } from '../../platform/http/actor';
import type { SessionTokens } from '../../platform/http/cookies';
import { hashSecret, newId, newSecret } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import * as repository from './sessions-repository';

const DAY_MS = 24 * 3600_000;
/** A session ends after this long in any case, and earlier when it is not used. */
const ABSOLUTE_MS = 90 * DAY_MS;
const IDLE_MS = 30 * DAY_MS;
/** Two tabs may send the same refresh token at once; within this time the older one is still taken. */
const GRACE_MS = 10_000;

export interface PublicSession {
  readonly id: string;
  readonly device: string;
  readonly createdAt: string;
  readonly lastUsedAt: string;
  readonly current: boolean;
}

/** Ends every session of a person, or all but one. */
export function endAllSessions(
  db: Database | Transaction,
  gymId: string,
  userId: string,
  now: Date,
  except?: string,
): Promise<number> {
  return repository.endSessions(db, gymId, userId, { except }, now);
}

export interface Sessions {
  /** Begins a session in the caller's transaction. */
  start(trx: Transaction, user: { gymId: string; id: string }, device: string): Promise<SessionTokens>;
  /** Swaps a refresh token for a new one. @throws AppError 401 when it is unknown, spent or its session has ended */
  refresh(refreshToken: string): Promise<SessionTokens>;
  endByRefreshToken(refreshToken: string): Promise<void>;
  list(actor: Actor): Promise<PublicSession[]>;
  end(actor: Actor, sessionId: string): Promise<void>;
}

export function createSessions(platform: Platform): Sessions {
  const { database, clock, config, logger } = platform;

  const issue = async (
    trx: Transaction,
    session: { id: string; gymId: string; userId: string },
    now: Date,
  ): Promise<SessionTokens> => {
    const refresh = newSecret();
    await repository.insertRefreshToken(trx, hashSecret(refresh), session.id, now);
    const access = signAccessToken(
      config.sessionSecret,
      { userId: session.userId, gymId: session.gymId, sessionId: session.id },
      now,
    );
    return { access, accessMs: ACCESS_SECONDS * 1000, refresh, refreshMs: IDLE_MS };
  };

  return {
    async start(trx, user, device) {
      const now = clock.now();
      const session = { id: newId(), gymId: user.gymId, userId: user.id };
      await repository.insertSession(trx, {
        ...session,
        device: device.slice(0, 120),
        createdAt: now,
        lastUsedAt: now,
        expiresAt: new Date(now.getTime() + ABSOLUTE_MS),
      });
      return issue(trx, session, now);
    },

    async refresh(refreshToken) {
      const tokenHash = hashSecret(refreshToken);
      // What is written on a refusal (the family's end) must stay, so it is thrown after the transaction.
      const tokens = await inTransaction(database, async (trx) => {
        const now = clock.now();
        const found = await repository.lockByRefreshToken(trx, tokenHash);
        if (!found?.userActive) return null;
        const { session, usedAt } = found;
        const idle = now.getTime() - session.lastUsedAt.getTime() > IDLE_MS;
        const reused = usedAt !== null && now.getTime() - usedAt.getTime() > GRACE_MS;
        if (idle || reused || session.expiresAt <= now) {
          if (reused)
            logger.warn({ sessionId: session.id }, 'a spent refresh token was used again; its session ends');
          await repository.endSessions(trx, session.gymId, session.userId, { only: session.id }, now);
          return null;
        }
        await repository.markRefreshUsed(trx, tokenHash, now);
        await repository.touchSession(trx, session.gymId, session.id, now);
        return issue(trx, session, now);
      });
      if (!tokens) throw notSignedIn();
      return tokens;
    },

    async endByRefreshToken(refreshToken) {
      await inTransaction(database, async (trx) => {
        const found = await repository.lockByRefreshToken(trx, hashSecret(refreshToken));
        if (!found) return;
        const { id, gymId, userId } = found.session;
        await repository.endSessions(trx, gymId, userId, { only: id }, clock.now());
      });
    },

    async list(actor) {
      const rows = await repository.listSessions(database, actor.gymId, actor.userId, clock.now());
      return rows.map((row) => ({
        id: row.id,
        device: row.device,
        createdAt: row.createdAt.toISOString(),
        lastUsedAt: row.lastUsedAt.toISOString(),
        current: row.id === actor.sessionId,
      }));
    },

    async end(actor, sessionId) {
      const ended = await repository.endSessions(
        database,
        actor.gymId,
        actor.userId,
        { only: sessionId },
        clock.now(),
      );
      if (ended === 0) throw notFound('That session');
    },
  };
}

/** Reads an access token and looks its session and account up, so that an end or a new role applies at once. */
export function createAuthenticate(platform: Platform): Authenticate {
  return async (accessToken) => {
    const now = platform.clock.now();
    const claims = readAccessToken(platform.config.sessionSecret, accessToken, now);
    return claims ? repository.findActor(platform.database, claims, now) : null;
  };
}
