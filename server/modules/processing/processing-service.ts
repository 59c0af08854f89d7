import type { Database, Transaction } from '../../platform/database';
import { recordEvent } from '../../platform/events';
import { enqueueJob } from '../../platform/jobs';
import { clipUnplayable, clipsReady } from '../takes';
import {
  findClip,
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
 * @returns false when the clip was replaced or withdrawn meanwhile; the caller then deletes what it made
 */
export async function publishClip(
  trx: Transaction,
  clip: ClipToProcess,
  published: PublishedClip,
  now: Date,
): Promise<boolean> {
  const present = await findClip(trx, clip.gymId, clip.id, true);
  if (present?.originalKey !== clip.originalKey) return false;
  await setReady(trx, clip.gymId, clip.id, published, now);
  if (present.outputPrefix && present.outputPrefix !== published.outputPrefix) {
    await enqueueJob(trx, 'objects.delete', { prefixes: [present.outputPrefix] }, now);
  }
  await recordEvent(trx, { ...told(clip), type: 'clip.ready' }, now);
  await clipsReady(trx, clip.gymId, clip.takeId, now);
  return true;
}

/** Marks a clip as one that cannot be used, and its take with it when that was submitted. */
export async function refuseClip(
  trx: Transaction,
  gymId: string,
  clipId: string,
  reason: string,
  now: Date,
): Promise<void> {
  const clip = await findClip(trx, gymId, clipId, true);
  if (!clip) return;
  await setUnplayable(trx, gymId, clipId, reason);
  await recordEvent(trx, { ...told(clip), type: 'clip.unplayable' }, now);
  await clipUnplayable(trx, gymId, clip.takeId, reason, now);
}
