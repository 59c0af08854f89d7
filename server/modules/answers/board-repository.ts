import type { Drawing, DraftAnswer, MarkDto, MeasureKind, RepMark } from '../../contract/answers';
import type { Point, View } from '../../contract/common';
import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

export interface CommentRow {
  readonly id: string;
  readonly takeId: string;
  readonly clipId: string;
  readonly view: View;
  readonly atMs: number;
  readonly endMs: number | null;
  readonly body: string;
  readonly drawing: Drawing | null;
  readonly faultId: string | null;
  readonly authorId: string;
  readonly createdAt: Date;
}

interface RawComment {
  id: string;
  take_id: string;
  clip_id: string;
  view: View;
  at_ms: number;
  end_ms: number | null;
  body: string;
  drawing: Drawing | null;
  fault_id: string | null;
  author_id: string;
  created_at: Date;
}

const toComment = (row: RawComment): CommentRow => ({
  id: row.id,
  takeId: row.take_id,
  clipId: row.clip_id,
  view: row.view,
  atMs: row.at_ms,
  endMs: row.end_ms,
  body: row.body,
  drawing: row.drawing,
  faultId: row.fault_id,
  authorId: row.author_id,
  createdAt: row.created_at,
});

const comments = (db: Db, gymId: string) =>
  db('comments')
    .join('clips', (on) => on.on('clips.gym_id', 'comments.gym_id').andOn('clips.id', 'comments.clip_id'))
    .where('comments.gym_id', gymId)
    .select('comments.*', 'clips.view');

/** Comments on the takes in the order of their instants. */
export async function commentsOf(db: Db, gymId: string, takeIds: readonly string[]): Promise<CommentRow[]> {
  const rows: RawComment[] = await comments(db, gymId)
    .whereIn('comments.take_id', takeIds)
    .orderBy('comments.at_ms')
    .orderBy('comments.id');
  return rows.map(toComment);
}

export async function findComment(db: Db, gymId: string, commentId: string): Promise<CommentRow | null> {
  const row: RawComment | undefined = await comments(db, gymId).where('comments.id', commentId).first();
  return row ? toComment(row) : null;
}

export interface CommentWords {
  readonly atMs: number;
  readonly endMs: number | null;
  readonly body: string;
  readonly drawing: Drawing | null;
  readonly faultId: string | null;
}

const commentColumns = (words: CommentWords) => ({
  at_ms: words.atMs,
  end_ms: words.endMs,
  body: words.body,
  drawing: words.drawing === null ? null : JSON.stringify(words.drawing),
  fault_id: words.faultId,
});

export async function insertComment(
  trx: Transaction,
  gymId: string,
  comment: CommentWords & { id: string; takeId: string; clipId: string; authorId: string },
  now: Date,
): Promise<void> {
  await trx('comments').insert({
    id: comment.id,
    gym_id: gymId,
    take_id: comment.takeId,
    clip_id: comment.clipId,
    author_id: comment.authorId,
    created_at: now,
    ...commentColumns(comment),
  });
}

export async function updateComment(
  trx: Transaction,
  gymId: string,
  commentId: string,
  words: CommentWords,
): Promise<void> {
  await trx('comments').where({ gym_id: gymId, id: commentId }).update(commentColumns(words));
}

export async function removeComment(trx: Transaction, gymId: string, commentId: string): Promise<void> {
  await trx('comments').where({ gym_id: gymId, id: commentId }).delete();
}

export async function marksOf(
  db: Db,
  gymId: string,
  takeIds: readonly string[],
): Promise<(MarkDto & { takeId: string })[]> {
  const rows: {
    take_id: string;
    fault_id: string;
    mark: MarkDto['mark'];
    clip_id: string | null;
    at_ms: number | null;
  }[] = await db('marks')
    .join('lift_faults', (on) =>
      on.on('lift_faults.gym_id', 'marks.gym_id').andOn('lift_faults.id', 'marks.fault_id'),
    )
    .where('marks.gym_id', gymId)
    .whereIn('marks.take_id', takeIds)
    .orderBy('lift_faults.position')
    .orderBy('marks.fault_id')
    .select('marks.take_id', 'marks.fault_id', 'marks.mark', 'marks.clip_id', 'marks.at_ms');
  return rows.map((row) => ({
    takeId: row.take_id,
    faultId: row.fault_id,
    mark: row.mark,
    clipId: row.clip_id,
    atMs: row.at_ms,
  }));
}

/** Sets the marks of a take as a whole. */
export async function replaceMarks(
  trx: Transaction,
  gymId: string,
  takeId: string,
  markedBy: string,
  marks: readonly MarkDto[],
): Promise<void> {
  await trx('marks').where({ gym_id: gymId, take_id: takeId }).delete();
  if (marks.length === 0) return;
  await trx('marks').insert(
    marks.map((mark) => ({
      gym_id: gymId,
      take_id: takeId,
      fault_id: mark.faultId,
      mark: mark.mark,
      clip_id: mark.clipId,
      at_ms: mark.atMs,
      marked_by: markedBy,
    })),
  );
}

export interface MeasureRow {
  readonly id: string;
  readonly takeId: string;
  readonly clipId: string;
  readonly atMs: number;
  readonly kind: MeasureKind;
  readonly points: Point[];
  readonly faultId: string | null;
  readonly value: number;
  readonly plusMinus: number;
  readonly authorId: string;
}

interface RawMeasure {
  id: string;
  take_id: string;
  clip_id: string;
  at_ms: number;
  kind: MeasureKind;
  points: Point[];
  fault_id: string | null;
  value: number;
  plus_minus: number;
  author_id: string;
}

const toMeasure = (row: RawMeasure): MeasureRow => ({
  id: row.id,
  takeId: row.take_id,
  clipId: row.clip_id,
  atMs: row.at_ms,
  kind: row.kind,
  points: row.points,
  faultId: row.fault_id,
  value: row.value,
  plusMinus: row.plus_minus,
  authorId: row.author_id,
});

export async function measuresOf(db: Db, gymId: string, takeIds: readonly string[]): Promise<MeasureRow[]> {
  const rows: RawMeasure[] = await db('measures')
    .where('gym_id', gymId)
    .whereIn('take_id', takeIds)
    .orderBy('at_ms')
    .orderBy('id');
  return rows.map(toMeasure);
}

export async function findMeasure(db: Db, gymId: string, measureId: string): Promise<MeasureRow | null> {
  const row: RawMeasure | undefined = await db('measures').where({ gym_id: gymId, id: measureId }).first();
  return row ? toMeasure(row) : null;
}

export async function insertMeasure(
  trx: Transaction,
  gymId: string,
  measure: MeasureRow,
  now: Date,
): Promise<void> {
  await trx('measures').insert({
    id: measure.id,
    gym_id: gymId,
    take_id: measure.takeId,
    clip_id: measure.clipId,
    author_id: measure.authorId,
    at_ms: measure.atMs,
    kind: measure.kind,
    points: JSON.stringify(measure.points),
    fault_id: measure.faultId,
    value: measure.value,
    plus_minus: measure.plusMinus,
    created_at: now,
  });
}

export async function removeMeasure(trx: Transaction, gymId: string, measureId: string): Promise<void> {
  await trx('measures').where({ gym_id: gymId, id: measureId }).delete();
}

/** Rep instants of the clips, in the order of time. */
export async function repMarksOf(
  db: Db,
  gymId: string,
  clipIds: readonly string[],
): Promise<(RepMark & { clipId: string })[]> {
  const rows: { clip_id: string; at_ms: number; kind: RepMark['kind'] }[] = await db('rep_marks')
    .where('gym_id', gymId)
    .whereIn('clip_id', clipIds)
    .orderBy('clip_id')
    .orderBy('at_ms')
    .select('clip_id', 'at_ms', 'kind');
  return rows.map((row) => ({ clipId: row.clip_id, atMs: row.at_ms, kind: row.kind }));
}

export async function replaceRepMarks(
  trx: Transaction,
  gymId: string,
  clipId: string,
  markedBy: string,
  marks: readonly RepMark[],
): Promise<void> {
  await trx('rep_marks').where({ gym_id: gymId, clip_id: clipId }).delete();
  if (marks.length === 0) return;
  await trx('rep_marks').insert(
    marks.map((mark) => ({
      gym_id: gymId,
      clip_id: clipId,
      at_ms: mark.atMs,
      kind: mark.kind,
      marked_by: markedBy,
    })),
  );
}

/** The take that a clip belongs to. */
export async function takeOfClip(db: Db, gymId: string, clipId: string): Promise<string | null> {
  const row: { take_id: string } | undefined = await db('clips')
    .where({ gym_id: gymId, id: clipId })
    .first('take_id');
  return row?.take_id ?? null;
}

export async function findDraft(db: Db, gymId: string, takeId: string): Promise<DraftAnswer | null> {
  const row: { draft: DraftAnswer } | undefined = await db('draft_answers')
    .where({ gym_id: gymId, take_id: takeId })
    .first('draft');
  return row?.draft ?? null;
}

export async function saveDraft(
  trx: Transaction,
  gymId: string,
  takeId: string,
  authorId: string,
  draft: DraftAnswer,
  now: Date,
): Promise<void> {
  await trx('draft_answers')
    .insert({
      gym_id: gymId,
      take_id: takeId,
      author_id: authorId,
      draft: JSON.stringify(draft),
      saved_at: now,
    })
    .onConflict('take_id')
    .merge(['author_id', 'draft', 'saved_at']);
}

export async function deleteDraft(trx: Transaction, gymId: string, takeId: string): Promise<void> {
  await trx('draft_answers').where({ gym_id: gymId, take_id: takeId }).delete();
}
