import type { Database, Transaction } from '../../platform/database';
import { recordEvent } from '../../platform/events';
import { enqueueJob } from '../../platform/jobs';
import { clipUnplayable, clipsReady } from '../takes';
import {
  findClip,
  isFollowed,
  setProcessing,
  setReady,
  setUnplayable,
  type ClipToProcess,
  type PublishedClip,
} from './processing-repository';

const told = (clip: ClipToProcess) => ({
  gymId: clip.gymId,
  actorId: null,
  takeId: clip.takeId,
  clipId: clip.id,
  to: { staff: false, userId: clip.memberId },
});

/** Whether the clip, as it is now, is still the one that was worked on: the same bytes and the same part of them. */
const isSame = (present: ClipToProcess | null, worked: ClipToProcess): present is ClipToProcess =>
  present?.originalKey === worked.originalKey &&
  present.trim?.startMs === worked.trim?.startMs &&
  present.trim?.endMs === worked.trim?.endMs;

/** Keeps the clip's progress and tells its member live. @param percent 0 to 100 */
export async function reportProgress(
  db: Database,
  clip: ClipToProcess,
  percent: number,
  now: Date,
): Promise<void> {
  await db.transaction(async (trx) => {
    await setProcessing(trx, clip.gymId, clip.id, percent);
    await recordEvent(trx, { ...told(clip), type: 'clip.progress', percent }, now);
  });
}

/**
 * Publishes renditions, in the transaction that completes the job.
 * @param clip as it was when the work began
 * @returns false when the clip was replaced, trimmed anew or withdrawn meanwhile; then what was made is of no use
 */
export async function publishClip(
  trx: Transaction,
  clip: ClipToProcess,
  published: PublishedClip,
  now: Date,
): Promise<boolean> {
  const present = await findClip(trx, clip.gymId, clip.id, true);
  if (!isSame(present, clip)) return false;
  await setReady(trx, clip.gymId, clip.id, published, now);
  if (present.outputPrefix && present.outputPrefix !== published.outputPrefix) {
    await enqueueJob(trx, 'objects.delete', { prefixes: [present.outputPrefix] }, now);
  }
  await recordEvent(trx, { ...told(clip), type: 'clip.ready' }, now);
  await clipsReady(trx, clip.gymId, clip.takeId, now);
  return true;
}

/**
 * Marks a clip as one that cannot be used, and its take with it when that was submitted. Does nothing when the clip was
 * replaced, trimmed anew or withdrawn meanwhile: that is another job's to judge.
 * @param clip as it was when the work began
 * @param publicUrl the base of the link in the mail
 */
export async function refuseClip(
  trx: Transaction,
  clip: ClipToProcess,
  reason: string,
  publicUrl: string,
  now: Date,
): Promise<void> {
  const present = await findClip(trx, clip.gymId, clip.id, true);
  if (!isSame(present, clip)) return;
  await setUnplayable(trx, clip.gymId, clip.id, reason);
  await recordEvent(trx, { ...told(clip), type: 'clip.unplayable' }, now);
  await clipUnplayable(trx, { gymId: clip.gymId, takeId: clip.takeId, reason, publicUrl }, now);
}

/** Gives a clip up after the last attempt of its job, unless a newer job of the clip will judge it. */
export async function giveClipUp(
  trx: Transaction,
  clip: ClipToProcess,
  jobId: number,
  publicUrl: string,
  now: Date,
): Promise<void> {
  if (await isFollowed(trx, clip.id, jobId)) return;
  await refuseClip(trx, clip, 'gave-up', publicUrl, now);
}
