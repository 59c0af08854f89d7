import { createHash } from 'node:crypto';
import { isDuplicate, type Database } from '../database';
import { conflict, malformed, refused } from '../errors';

export interface RememberedAnswer {
  readonly status: number;
  readonly answer: unknown;
}

/** After this long without an end a first call is taken for dead, ms. */
const IN_FLIGHT_MS = 15 * 60_000;

/**
 * Runs a creating call once per (person, key): the same key and body give the first answer again.
 * @param body what the caller sent; null where it is a stream and the key alone decides
 * @throws AppError 409 while the first call runs, 422 when the key was used with another body
 */
export async function once(
  database: Database,
  call: { userId: string; key: string; route: string; body: unknown; now: Date },
  work: () => Promise<RememberedAnswer>,
): Promise<RememberedAnswer> {
  if (!/^[\x21-\x7e]{1,120}$/.test(call.key)) {
    throw malformed([
      { path: 'Idempotency-Key', message: 'An Idempotency-Key is 1 to 120 printable ASCII characters.' },
    ]);
  }
  const where = { user_id: call.userId, idempotency_key: call.key };
  const body_hash = createHash('sha256')
    .update(JSON.stringify(call.body ?? null))
    .digest();
  try {
    await database('idempotency_keys').insert({
      ...where,
      route: call.route,
      body_hash,
      created_at: call.now,
    });
  } catch (error) {
    if (!isDuplicate(error)) throw error;
    const known:
      | { route: string; body_hash: Buffer; status: number | null; answer: string | null; created_at: Date }
      | undefined = await database('idempotency_keys').where(where).first();
    if (!known) throw conflict('in-flight', 'The first call with this key is just ending. Try again.');
    if (known.route !== call.route || !known.body_hash.equals(body_hash)) {
      throw refused('key-reused', 'This Idempotency-Key was used for another call. Use a new one.');
    }
    if (known.status !== null)
      return { status: known.status, answer: known.answer === null ? null : JSON.parse(known.answer) };
    const stale = new Date(call.now.getTime() - IN_FLIGHT_MS);
    const taken = await database('idempotency_keys')
      .where(where)
      .andWhere('created_at', '<', stale)
      .whereNull('status')
      .update({ created_at: call.now });
    if (taken === 0)
      throw conflict('in-flight', 'The first call with this key is still running. Wait for it.');
  }
  try {
    const result = await work();
    await database('idempotency_keys')
      .where(where)
      .update({ status: result.status, answer: JSON.stringify(result.answer ?? null) });
    return result;
  } catch (error) {
    await database('idempotency_keys').where(where).whereNull('status').delete();
    throw error;
  }
}
