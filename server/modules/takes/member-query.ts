import { isMinor } from '../../calc/age';
import type { Database, Transaction } from '../../platform/database';

/** What a take needs to know of its member, read alone. */
export interface MemberFacts {
  /** Null once the account is closed: nothing is sent there any more. */
  readonly email: string | null;
  readonly kit: string | null;
  /** Under 18, and no guardian's consent is recorded. */
  readonly needsConsent: boolean;
}

/** Facts of one member of the gym; null when there is no such person. */
export async function memberFacts(
  db: Database | Transaction,
  gymId: string,
  memberId: string,
  now: Date,
): Promise<MemberFacts | null> {
  const row:
    | {
        email: string;
        active: 0 | 1;
        kit: string | null;
        born_on: string | null;
        guardian_consent_at: Date | null;
      }
    | undefined = await db('users')
    .where({ gym_id: gymId, id: memberId })
    .first('email', 'active', 'kit', 'born_on', 'guardian_consent_at');
  if (!row) return null;
  const today = now.toISOString().slice(0, 10);
  return {
    email: row.active === 1 ? row.email : null,
    kit: row.kit,
    needsConsent: row.born_on !== null && row.guardian_consent_at === null && isMinor(row.born_on, today),
  };
}
