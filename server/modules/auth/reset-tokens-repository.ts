import type { Database, Transaction } from '../../platform/database';

export interface ResetToken {
  readonly gymId: string;
  readonly userId: string;
  readonly expiresAt: Date;
  readonly usedAt: Date | null;
}

/** Adds a token and spends the person's earlier ones, so that only the newest mail works. */
export async function insertResetToken(
  trx: Transaction,
  token: { tokenHash: Buffer; gymId: string; userId: string; expiresAt: Date },
  now: Date,
): Promise<void> {
  await spendResetTokens(trx, token.gymId, token.userId, now);
  await trx('reset_tokens').insert({
    token_hash: token.tokenHash,
    gym_id: token.gymId,
    user_id: token.userId,
    created_at: now,
    expires_at: token.expiresAt,
  });
}

/** Spends what is still open of a person's tokens. */
export async function spendResetTokens(
  trx: Transaction,
  gymId: string,
  userId: string,
  now: Date,
): Promise<void> {
  await trx('reset_tokens')
    .where({ gym_id: gymId, user_id: userId })
    .whereNull('used_at')
    .update({ used_at: now });
}

/** The token of an active account; in a transaction `lock` holds its row, so that it is spent once. */
export async function findResetToken(
  db: Database | Transaction,
  tokenHash: Buffer,
  lock = false,
): Promise<ResetToken | null> {
  const query = db('reset_tokens')
    .join('users', (on) =>
      on.on('users.gym_id', 'reset_tokens.gym_id').andOn('users.id', 'reset_tokens.user_id'),
    )
    .where('reset_tokens.token_hash', tokenHash)
    .andWhere('users.active', true)
    .first('reset_tokens.gym_id', 'reset_tokens.user_id', 'reset_tokens.expires_at', 'reset_tokens.used_at');
  const row: { gym_id: string; user_id: string; expires_at: Date; used_at: Date | null } | undefined =
    await (lock ? query.forUpdate() : query);
  return row
    ? { gymId: row.gym_id, userId: row.user_id, expiresAt: row.expires_at, usedAt: row.used_at }
    : null;
}
