import { inTransaction, type Database, type Transaction } from '../../platform/database';
import { conflict } from '../../platform/errors';
import type { Actor } from '../../platform/http/actor';
import { names } from '../people';
import { holderOf, lockedTake, tellTake, type TakeRow } from '../takes';
import { lapsedLeases, lastHolder, leasesOf, setLease } from './queue-repository';

/** A pick-up holds this long without being renewed, so that a closed laptop never blocks a clip, ms. */
export const PICK_UP_MS = 90_000;

async function heldBy(trx: Transaction, take: TakeRow, holder: { userId: string; until: Date }) {
  const by = (await names(trx, take.gymId, [holder.userId])).get(holder.userId);
  return { by: by ?? { id: holder.userId, name: '' }, until: holder.until.toISOString() };
}

const notWaiting = (take: TakeRow) =>
  take.state === 'answered'
    ? conflict('answered', 'This take has been answered already.')
    : conflict('not-waiting', 'This take does not wait for an answer any more. Go back to the queue.');

/**
 * Gives a waiting take to the actor, or renews their lease.
 * @param take its row, held by the transaction
 * @throws AppError 409 with `by` and `until` while another coach has it
 */
export async function takeLease(trx: Transaction, actor: Actor, take: TakeRow, now: Date): Promise<Date> {
  if (take.state !== 'waiting') throw notWaiting(take);
  const holder = holderOf(take, now);
  if (holder && holder.userId !== actor.userId) {
    const members = await heldBy(trx, take, holder);
    throw conflict('picked-up', `${members.by.name} is answering this take.`, members);
  }
  const until = new Date(now.getTime() + PICK_UP_MS);
  await setLease(trx, take.gymId, take.id, { userId: actor.userId, until });
  if (!holder) await tellTake(trx, take, 'take.picked-up', actor.userId, now);
  return until;
}

/**
 * The take, held by the transaction, for a write of the coach who picked it up. A lease that ran out, and that
 * nobody else took since, is renewed on the way, so that no words are lost.
 * @throws AppError 404; 409 when it is answered, or picked up by another or by nobody
 */
export async function heldTake(trx: Transaction, actor: Actor, takeId: string, now: Date): Promise<TakeRow> {
  const take = await lockedTake(trx, actor.gymId, takeId);
  if (take.state !== 'waiting') throw notWaiting(take);
  const holder = holderOf(take, now);
  if (holder?.userId === actor.userId) return take;
  if (holder) {
    const members = await heldBy(trx, take, holder);
    throw conflict(
      'not-picked-up',
      `${members.by.name} has picked this take up meanwhile. Go back to the queue, or ask them to put it back.`,
      members,
    );
  }
  if ((await lastHolder(trx, actor.gymId, takeId)) !== actor.userId) {
    throw conflict('not-picked-up', 'Pick the take up before you write on it.', { by: null, until: null });
  }
  await takeLease(trx, actor, take, now);
  return take;
}

/** Ends the actor's lease; nothing to do when nobody has one. @throws AppError 409 while another coach has it */
export async function endLease(trx: Transaction, actor: Actor, take: TakeRow, now: Date): Promise<void> {
  const holder = holderOf(take, now);
  if (holder && holder.userId !== actor.userId) {
    const members = await heldBy(trx, take, holder);
    throw conflict('picked-up', `${members.by.name} is answering this take.`, members);
  }
  if (take.state !== 'waiting' || take.pickedUpBy !== actor.userId) return;
  await setLease(trx, take.gymId, take.id, null);
  await tellTake(trx, take, 'take.put-back', actor.userId, now);
}

/** Returns to the queue what a coach has picked up, in the caller's transaction. */
export async function releaseAll(trx: Transaction, gymId: string, userId: string, now: Date): Promise<void> {
  for (const takeId of await leasesOf(trx, gymId, userId)) {
    const take = await lockedTake(trx, gymId, takeId);
    if (take.state !== 'waiting' || take.pickedUpBy !== userId) continue;
    await setLease(trx, gymId, takeId, null);
    await tellTake(trx, take, 'take.put-back', userId, now);
  }
}

/**
 * Returns takes whose lease has run out to the queue, for everyone to see; for the worker's sweep.
 * @returns how many
 */
export async function sweepLapsed(database: Database, now: Date): Promise<number> {
  let returned = 0;
  for (const { gymId, takeId } of await lapsedLeases(database, now)) {
    await inTransaction(database, async (trx) => {
      const take = await lockedTake(trx, gymId, takeId);
      // Renewed or answered since it was looked up.
      if (take.state !== 'waiting' || !take.pickedUpUntil || take.pickedUpUntil > now) return;
      await setLease(trx, gymId, takeId, null);
      await tellTake(trx, take, 'take.lapsed', null, now);
      returned += 1;
    });
  }
  return returned;
}
