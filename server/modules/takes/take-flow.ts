import type { EventType } from '../../contract/live';
import type { Transaction } from '../../platform/database';
import { notFound } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import { enqueueJob } from '../../platform/jobs';
import { liftsByIds } from '../lifts';
import { mails, notify, sendMailLater } from '../notices';
import { contactOf, names, staffOf } from '../people';
import { problemOf } from './clip-dto';
import { clipsOfTakes, type ClipRow } from './take-clips-repository';
import type { TakeRow } from './take-row';
import { findTake, lockTake, setUnplayable, setWaiting } from './takes-repository';

/** Coaches are warned this long before an answer is due. */
const WARN_BEFORE_MS = 60 * 60_000;

/** Tells staff and the take's member of a change, in its transaction. */
export async function tellTake(
  trx: Transaction,
  take: Pick<TakeRow, 'id' | 'gymId' | 'memberId'>,
  type: EventType,
  actorId: string | null,
  now: Date,
): Promise<void> {
  await recordEvent(
    trx,
    { gymId: take.gymId, type, actorId, takeId: take.id, to: { staff: true, userId: take.memberId } },
    now,
  );
}

/** The names that a notice about a take needs. */
export async function wordsFor(
  trx: Transaction,
  take: Pick<TakeRow, 'gymId' | 'memberId' | 'liftId'>,
): Promise<{ member: string; lift: string }> {
  const [people, lifts] = await Promise.all([
    names(trx, take.gymId, [take.memberId]),
    liftsByIds(trx, take.gymId, [take.liftId]),
  ]);
  return {
    member: people.get(take.memberId)?.name ?? 'A member',
    lift: lifts.get(take.liftId)?.name ?? 'lift',
  };
}

const playable = (take: TakeRow, clips: readonly ClipRow[]) =>
  take.views.every((view) => clips.some((clip) => clip.view === view && clip.state === 'ready'));

/** Puts a submitted take whose clips can all be played into the queue, and makes sure that nobody forgets it. */
export async function waitWhenReady(trx: Transaction, take: TakeRow, now: Date): Promise<void> {
  if (take.state !== 'processing' || !take.answerBy || !take.submittedAt) return;
  if (!playable(take, await clipsOfTakes(trx, take.gymId, [take.id]))) return;
  await setWaiting(trx, take.gymId, take.id, now);
  await tellTake(trx, take, 'take.waiting', null, now);
  const words = await wordsFor(trx, take);
  const staff = await staffOf(trx, take.gymId);
  await notify(
    trx,
    {
      gymId: take.gymId,
      userIds: staff.map((coach) => coach.id),
      kind: 'take-waiting',
      title: `${words.member} waits for an answer`,
      body: `${words.lift}, take ${take.number}.`,
      link: `/board/${take.id}`,
    },
    now,
  );
  const warnAt = new Date(Math.max(now.getTime(), take.answerBy.getTime() - WARN_BEFORE_MS));
  await enqueueJob(trx, 'take.warn', { takeId: take.id, gymId: take.gymId }, now, {
    runAt: warnAt,
    dedupeKey: `take.warn:${take.id}:${take.submittedAt.getTime()}`,
  });
}

/** To be called, in the same transaction, when a clip of the take became ready. */
export async function clipsReady(trx: Transaction, gymId: string, takeId: string, now: Date): Promise<void> {
  const take = await lockTake(trx, gymId, takeId);
  if (take) await waitWhenReady(trx, take, now);
}

export interface Unplayable {
  readonly gymId: string;
  readonly takeId: string;
  readonly reason: string;
  /** The base of the link in the mail. */
  readonly publicUrl: string;
}

/**
 * To be called, in the same transaction, when a clip of the take turned out to be unusable. A submitted take goes
 * back to its member with the reason and the remedy, in the app and by mail; a draft just shows it at the clip.
 */
export async function clipUnplayable(
  trx: Transaction,
  { gymId, takeId, reason, publicUrl }: Unplayable,
  now: Date,
): Promise<void> {
  const take = await lockTake(trx, gymId, takeId);
  if (take?.state !== 'processing') return;
  await setUnplayable(trx, gymId, takeId, reason);
  await tellTake(trx, take, 'take.unplayable', null, now);
  const { message, remedy } = problemOf(reason);
  const { lift } = await wordsFor(trx, take);
  const filming = `/filming/${take.assignmentId}`;
  await notify(
    trx,
    {
      gymId,
      userIds: [take.memberId],
      kind: 'take-unplayable',
      title: `Your ${lift.toLowerCase()} clip could not be used`,
      body: `${message} ${remedy}`,
      link: filming,
    },
    now,
  );
  const contact = await contactOf(trx, gymId, take.memberId);
  if (!contact) return;
  const mail = mails.takeUnplayable({
    memberName: contact.name,
    liftName: lift,
    message,
    remedy,
    link: `${publicUrl}${filming}`,
  });
  await sendMailLater(trx, contact.email, mail, now);
}

/** @throws AppError 404 */
export async function lockedTake(trx: Transaction, gymId: string, takeId: string): Promise<TakeRow> {
  const take = await lockTake(trx, gymId, takeId);
  if (!take) throw notFound('That take');
  return take;
}

/** @throws AppError 404 */
export async function takeOf(
  db: Parameters<typeof findTake>[0],
  gymId: string,
  takeId: string,
): Promise<TakeRow> {
  const take = await findTake(db, gymId, takeId);
  if (!take) throw notFound('That take');
  return take;
}
