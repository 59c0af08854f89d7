import type { View } from '../../contract/common';
import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

/** What the routes of one clip need to know of it and of who may see it. */
export interface ClipAccess {
  readonly id: string;
  readonly takeId: string;
  readonly memberId: string;
  readonly takeState: string;
  readonly originalKey: string;
  readonly outputPrefix: string | null;
  readonly ready: boolean;
  readonly coachesSeeOriginals: boolean;
}

/** A clip with its take's owner and state, and the gym's word on originals, in one look. */
export async function clipAccess(db: Db, gymId: string, clipId: string): Promise<ClipAccess | null> {
  const row:
    | {
        id: string;
        take_id: string;
        member_id: string;
        take_state: string;
        original_key: string;
        output_prefix: string | null;
        state: string;
        coaches_see_originals: 0 | 1;
      }
    | undefined = await db('clips')
    .join('takes', (on) => on.on('takes.gym_id', 'clips.gym_id').andOn('takes.id', 'clips.take_id'))
    .join('gyms', 'gyms.id', 'clips.gym_id')
    .where({ 'clips.gym_id': gymId, 'clips.id': clipId })
    .first(
      'clips.id',
      'clips.take_id',
      'clips.original_key',
      'clips.output_prefix',
      'clips.state',
      'takes.member_id',
      'takes.state as take_state',
      'gyms.coaches_see_originals',
    );
  if (!row) return null;
  return {
    id: row.id,
    takeId: row.take_id,
    memberId: row.member_id,
    takeState: row.take_state,
    originalKey: row.original_key,
    outputPrefix: row.output_prefix,
    ready: row.state === 'ready',
    coachesSeeOriginals: row.coaches_see_originals === 1,
  };
}

/** The key prefix under which everything of a clip lies, by the take and view it is of; null when there is none. */
export async function clipIdAt(
  trx: Transaction,
  gymId: string,
  takeId: string,
  view: View,
): Promise<string | null> {
  const row: { id: string } | undefined = await trx('clips')
    .where({ gym_id: gymId, take_id: takeId, view })
    .first('id');
  return row?.id ?? null;
}

export async function insertClip(
  trx: Transaction,
  clip: {
    id: string;
    gymId: string;
    takeId: string;
    view: View;
    originalKey: string;
    sizeBytes: number;
    sha256: string;
  },
  now: Date,
): Promise<void> {
  await trx('clips').insert({
    id: clip.id,
    gym_id: clip.gymId,
    take_id: clip.takeId,
    view: clip.view,
    state: 'uploaded',
    original_key: clip.originalKey,
    size_bytes: clip.sizeBytes,
    sha256: clip.sha256,
    created_at: now,
  });
}

export async function deleteClip(trx: Transaction, gymId: string, clipId: string): Promise<void> {
  await trx('clips').where({ gym_id: gymId, id: clipId }).delete();
}

/** Length of the clip as filmed, ms; null until it was looked at. */
export async function filmedMs(trx: Transaction, gymId: string, clipId: string): Promise<number | null> {
  const row: { source_facts: { durationMs?: unknown } | null } | undefined = await trx('clips')
    .where({ gym_id: gymId, id: clipId })
    .first('source_facts');
  const length = row?.source_facts?.durationMs;
  return typeof length === 'number' ? length : null;
}

/** Sets the part to keep and puts the clip back to the start of its way. */
export async function setTrim(
  trx: Transaction,
  gymId: string,
  clipId: string,
  trim: { startMs: number; endMs: number } | null,
): Promise<void> {
  await trx('clips')
    .where({ gym_id: gymId, id: clipId })
    .update({
      trim_start_ms: trim?.startMs ?? null,
      trim_end_ms: trim?.endMs ?? null,
      state: 'uploaded',
      progress: 0,
      problem_reason: null,
    });
}

/** Notes that the actor has seen the clip, once in each hour. */
export async function noteViewed(
  db: Database,
  gymId: string,
  actorId: string,
  clipId: string,
  hour: Date,
  now: Date,
): Promise<void> {
  const known: { id: number } | undefined = await db('audit')
    .where({ gym_id: gymId, subject_id: clipId, actor_id: actorId, action: 'clip.viewed' })
    .andWhere('at', '>=', hour)
    .first('id');
  if (known) return;
  await db('audit').insert({
    gym_id: gymId,
    actor_id: actorId,
    action: 'clip.viewed',
    subject_id: clipId,
    at: now,
  });
}
