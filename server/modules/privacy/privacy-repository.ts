import type { Database, Transaction } from '../../platform/database';

/** Notes that a person was erased, so that a restore from a backup can erase them again. */
export async function noteErasure(trx: Transaction, gymId: string, userId: string, now: Date): Promise<void> {
  await trx('erasures').insert({ subject_id: userId, gym_id: gymId, at: now });
}

/** Deletes the remembered answers of a person's calls, which repeat their words. */
export async function forgetAnswers(trx: Transaction | Database, userId: string): Promise<void> {
  await trx('idempotency_keys').where('user_id', userId).delete();
}
