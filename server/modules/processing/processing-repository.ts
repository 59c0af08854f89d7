import type { View } from '../../contract';
import type { Database, Transaction } from '../../platform/database';

/** What the worker needs to know of a clip. */
export interface ClipToProcess {
  readonly id: string;
  readonly gymId: string;
  readonly takeId: string;
  readonly memberId: string;
  readonly view: View;
  readonly originalKey: string;
  readonly sha256: string;
  readonly sizeBytes: number;
  readonly trim: { readonly startMs: number; readonly endMs: number } | null;
  readonly outputPrefix: string | null;
}

interface Row {
  id: string;
  gym_id: string;
  take_id: string;
  member_id: string;
  view: View;
  original_key: string;
  sha256: string;
  size_bytes: number;
  trim_start_ms: number | null;
  trim_end_ms: number | null;
  output_prefix: string | null;
}

/** The clip, or null when it was replaced or withdrawn meanwhile. `lock` holds its row until the transaction ends. */
export async function findClip(
  db: Database | Transaction,
  gymId: string,
  clipId: string,
  lock = false,
): Promise<ClipToProcess | null> {
  const query = db('clips')
    .join('takes', (on) => on.on('takes.gym_id', 'clips.gym_id').andOn('takes.id', 'clips.take_id'))
    .where({ 'clips.gym_id': gymId, 'clips.id': clipId })
    .first('clips.*', 'takes.member_id');
  const row: Row | undefined = await (lock ? query.forUpdate() : query);
  if (!row) return null;
  return {
    id: row.id,
    gymId: row.gym_id,
    takeId: row.take_id,
    memberId: row.member_id,
    view: row.view,
    originalKey: row.original_key,
    sha256: row.sha256,
    sizeBytes: row.size_bytes,
    trim:
      row.trim_start_ms === null || row.trim_end_ms === null
        ? null
        : { startMs: row.trim_start_ms, endMs: row.trim_end_ms },
    outputPrefix: row.output_prefix,
  };
}

const clip = (db: Database | Transaction, gymId: string, clipId: string) =>
  db('clips').where({ gym_id: gymId, id: clipId });

export async function setProcessing(
  db: Database | Transaction,
  gymId: string,
  clipId: string,
  percent: number,
): Promise<void> {
  await clip(db, gymId, clipId)
    .whereIn('state', ['uploaded', 'processing'])
    .update({ state: 'processing', progress: percent });
}

export interface PublishedClip {
  readonly outputPrefix: string;
  readonly durationMs: number;
  readonly width: number;
  readonly height: number;
  readonly fps: { readonly num: number; readonly den: number };
  readonly frames: number;
  readonly sourceFacts: unknown;
}

export async function setReady(
  trx: Transaction,
  gymId: string,
  clipId: string,
  published: PublishedClip,
  now: Date,
): Promise<void> {
  await clip(trx, gymId, clipId).update({
    state: 'ready',
    progress: 100,
    output_prefix: published.outputPrefix,
    duration_ms: published.durationMs,
    width: published.width,
    height: published.height,
    fps_num: published.fps.num,
    fps_den: published.fps.den,
    frames: published.frames,
    source_facts: JSON.stringify(published.sourceFacts),
    problem_reason: null,
    ready_at: now,
  });
}

export async function setUnplayable(
  trx: Transaction,
  gymId: string,
  clipId: string,
  reason: string,
): Promise<void> {
  await clip(trx, gymId, clipId).update({ state: 'unplayable', problem_reason: reason });
}

/** Whether a newer job of the clip was queued after this one. */
export async function isFollowed(trx: Transaction, clipId: string, jobId: number): Promise<boolean> {
  const newer: { id: number } | undefined = await trx('jobs')
    .where('dedupe_key', 'like', `clip.process:${clipId}%`)
    .andWhere('id', '>', jobId)
    .first('id');
  return newer !== undefined;
}

/** Progress events are of use only while they are fresh. @returns how many went */
export async function pruneProgressEvents(db: Database, before: Date): Promise<number> {
  return db('events')
    .where('type', 'clip.progress')
    .andWhere('at', '<', before)
    .whereNotNull('seq')
    .limit(1000)
    .delete();
}

/** Says that this worker lives. */
export async function beat(db: Database, worker: string, note: string, now: Date): Promise<void> {
  await db('worker_beats').insert({ worker, at: now, note }).onConflict('worker').merge();
  await db('worker_beats')
    .where('at', '<', new Date(now.getTime() - 24 * 3600_000))
    .delete();
}
