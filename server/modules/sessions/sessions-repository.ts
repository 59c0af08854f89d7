import type { Role } from '../../contract';
import type { Database, Transaction } from '../../platform/database';
import type { Actor } from '../../platform/http/actor';

type Db = Database | Transaction;

export interface SessionRow {
  readonly id: string;
  readonly gymId: string;
  readonly userId: string;
  readonly device: string;
  readonly createdAt: Date;
  readonly lastUsedAt: Date;
  readonly expiresAt: Date;
}

interface Row {
  id: string;
  gym_id: string;
  user_id: string;
  device: string;
  created_at: Date;
  last_used_at: Date;
  expires_at: Date;
}

const toSession = (row: Row): SessionRow => ({
  id: row.id,
  gymId: row.gym_id,
  userId: row.user_id,
  device: row.device,
  createdAt: row.created_at,
  lastUsedAt: row.last_used_at,
  expiresAt: row.expires_at,
});

export async function insertSession(db: Db, session: SessionRow): Promise<void> {
  await db('sessions').insert({
    id: session.id,
    gym_id: session.gymId,
    user_id: session.userId,
    device: session.device,
    created_at: session.createdAt,
    last_used_at: session.lastUsedAt,
    expires_at: session.expiresAt,
  });
}

export async function insertRefreshToken(
  db: Db,
  tokenHash: Buffer,
  sessionId: string,
  now: Date,
): Promise<void> {
  await db('refresh_tokens').insert({ token_hash: tokenHash, session_id: sessionId, created_at: now });
}

export interface RefreshRow {
  readonly session: SessionRow;
  readonly usedAt: Date | null;
  readonly userActive: boolean;
}

/** The session behind a refresh token that has not ended, its rows held by the transaction. */
export async function lockByRefreshToken(trx: Transaction, tokenHash: Buffer): Promise<RefreshRow | null> {
  const row: (Row & { used_at: Date | null; active: 0 | 1 }) | undefined = await trx('refresh_tokens')
    .join('sessions', 'sessions.id', 'refresh_tokens.session_id')
    .join('users', (on) => on.on('users.gym_id', 'sessions.gym_id').andOn('users.id', 'sessions.user_id'))
    .where('refresh_tokens.token_hash', tokenHash)
    .whereNull('sessions.ended_at')
    .first('sessions.*', 'refresh_tokens.used_at', 'users.active')
    .forUpdate();
  return row ? { session: toSession(row), usedAt: row.used_at, userActive: row.active === 1 } : null;
}

export async function markRefreshUsed(trx: Transaction, tokenHash: Buffer, now: Date): Promise<void> {
  await trx('refresh_tokens').where('token_hash', tokenHash).whereNull('used_at').update({ used_at: now });
}

export async function touchSession(
  trx: Transaction,
  gymId: string,
  sessionId: string,
  now: Date,
): Promise<void> {
  await trx('sessions').where({ gym_id: gymId, id: sessionId }).update({ last_used_at: now });
}

/** Ends sessions of a person: one, all, or all but one. @returns how many ended */
export async function endSessions(
  db: Db,
  gymId: string,
  userId: string,
  which: { only?: string; except?: string },
  now: Date,
): Promise<number> {
  const query = db('sessions').where({ gym_id: gymId, user_id: userId }).whereNull('ended_at');
  if (which.only) query.andWhere('id', which.only);
  if (which.except) query.andWhereNot('id', which.except);
  return query.update({ ended_at: now });
}

export async function listSessions(db: Db, gymId: string, userId: string, now: Date): Promise<SessionRow[]> {
  const rows: Row[] = await db('sessions')
    .where({ gym_id: gymId, user_id: userId })
    .whereNull('ended_at')
    .andWhere('expires_at', '>', now)
    .orderBy('last_used_at', 'desc');
  return rows.map(toSession);
}

/** Who a living session belongs to, as the account stands now. */
export async function findActor(
  db: Db,
  claims: { gymId: string; userId: string; sessionId: string },
  now: Date,
): Promise<Actor | null> {
  const row: { role: Role; name: string } | undefined = await db('sessions')
    .join('users', (on) => on.on('users.gym_id', 'sessions.gym_id').andOn('users.id', 'sessions.user_id'))
    .where({
      'sessions.id': claims.sessionId,
      'sessions.gym_id': claims.gymId,
      'sessions.user_id': claims.userId,
    })
    .andWhere('users.active', true)
    .whereNull('sessions.ended_at')
    .andWhere('sessions.expires_at', '>', now)
    .first('users.role', 'users.name');
  return row ? { ...claims, role: row.role, name: row.name } : null;
}

/** Deletes every trace of a person's sessions: devices and times of use too. */
export async function deleteSessions(trx: Transaction, gymId: string, userId: string): Promise<void> {
  await trx('sessions').where({ gym_id: gymId, user_id: userId }).delete();
}
