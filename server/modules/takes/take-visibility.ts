import type { Database, Transaction } from '../../platform/database';
import { forbidden, notFound } from '../../platform/errors';
import type { Actor } from '../../platform/http/actor';
import { findUser } from '../people';
import { takeOf } from './take-flow';
import type { TakeRow } from './take-row';

type Db = Database | Transaction;

/** Whether the take's member is under 18 and no guardian's consent is recorded. */
export async function needsConsent(
  db: Db,
  take: Pick<TakeRow, 'gymId' | 'memberId'>,
  now: Date,
): Promise<boolean> {
  return (await findUser(db, take.gymId, take.memberId, now))?.needsGuardianConsent ?? false;
}

/**
 * The take, when the actor may see it: members their own, coaches those of their gym that were handed in.
 * @throws AppError 404 otherwise
 */
export async function loadVisible(db: Db, actor: Actor, takeId: string): Promise<TakeRow> {
  const take = await takeOf(db, actor.gymId, takeId);
  const visible = actor.role === 'member' ? take.memberId === actor.userId : take.state !== 'draft';
  if (!visible) throw notFound('That take');
  return take;
}

/** @throws AppError 403 when a coach would see clips of a minor whose guardian has not agreed */
export async function mayBeSeen(
  db: Db,
  actor: Actor,
  take: Pick<TakeRow, 'gymId' | 'memberId'>,
  now: Date,
): Promise<void> {
  if (actor.role === 'member') return;
  if (await needsConsent(db, take, now)) {
    throw forbidden(
      'This member is under 18 and no guardian’s consent is recorded, so the clips cannot be seen. Record the consent on the member’s page first.',
    );
  }
}
