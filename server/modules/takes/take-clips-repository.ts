import type { View } from '../../contract/common';
import type { ClipState } from '../../contract/takes';
import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

/** A clip as the database holds it. */
export interface ClipRow {
  readonly id: string;
  readonly takeId: string;
  readonly view: View;
  readonly state: ClipState;
  readonly progress: number;
  readonly originalKey: string;
  readonly sizeBytes: number;
  readonly sha256: string;
  readonly trim: { readonly startMs: number; readonly endMs: number } | null;
  readonly outputPrefix: string | null;
  readonly durationMs: number | null;
  readonly width: number | null;
  readonly height: number | null;
  readonly fps: { readonly num: number; readonly den: number } | null;
  readonly frames: number | null;
  readonly problemReason: string | null;
}

interface Row {
  id: string;
  take_id: string;
  view: View;
  state: ClipState;
  progress: number;
  original_key: string;
  size_bytes: number;
  sha256: string;
  trim_start_ms: number | null;
  trim_end_ms: number | null;
  output_prefix: string | null;
  duration_ms: number | null;
  width: number | null;
  height: number | null;
  fps_num: number | null;
  fps_den: number | null;
  frames: number | null;
  problem_reason: string | null;
}

const COLUMNS = [
  'id',
  'take_id',
  'view',
  'state',
  'progress',
  'original_key',
  'size_bytes',
  'sha256',
  'trim_start_ms',
  'trim_end_ms',
  'output_prefix',
  'duration_ms',
  'width',
  'height',
  'fps_num',
  'fps_den',
  'frames',
  'problem_reason',
] as const;

const toClip = (row: Row): ClipRow => ({
  id: row.id,
  takeId: row.take_id,
  view: row.view,
  state: row.state,
  progress: row.progress,
  originalKey: row.original_key,
  sizeBytes: row.size_bytes,
  sha256: row.sha256,
  trim:
    row.trim_start_ms === null || row.trim_end_ms === null
      ? null
      : { startMs: row.trim_start_ms, endMs: row.trim_end_ms },
  outputPrefix: row.output_prefix,
  durationMs: row.duration_ms,
  width: row.width,
  height: row.height,
  fps: row.fps_num === null || row.fps_den === null ? null : { num: row.fps_num, den: row.fps_den },
  frames: row.frames,
  problemReason: row.problem_reason,
});

/** The clips of the takes, front before side. */
export async function clipsOfTakes(db: Db, gymId: string, takeIds: readonly string[]): Promise<ClipRow[]> {
  if (takeIds.length === 0) return [];
  const rows: Row[] = await db('clips')
    .where('gym_id', gymId)
    .whereIn('take_id', takeIds)
    .orderBy('view')
    .select(...COLUMNS);
  return rows.map(toClip);
}

export async function deleteClipsOfTake(trx: Transaction, gymId: string, takeId: string): Promise<void> {
  await trx('clips').where({ gym_id: gymId, take_id: takeId }).delete();
}

/** Puts a take's unplayable clips back to the start. */
export async function resetUnplayableClips(trx: Transaction, gymId: string, takeId: string): Promise<void> {
  await trx('clips')
    .where({ gym_id: gymId, take_id: takeId, state: 'unplayable' })
    .update({ state: 'uploaded', progress: 0, problem_reason: null });
}
