import type { Call, Refilm } from '../../contract/answers';
import type { Database, Transaction } from '../../platform/database';

type Db = Database | Transaction;

export interface AnswerRow {
  readonly takeId: string;
  readonly authorId: string;
  readonly topCue: string;
  readonly call: Call;
  readonly scale: { readonly id: string; readonly name: string; readonly note: string } | null;
  readonly tempo: string | null;
  readonly refilm: Refilm | null;
  readonly answeredAt: Date;
}

/** The answers sent to the takes. */
export async function findAnswers(db: Db, gymId: string, takeIds: readonly string[]): Promise<AnswerRow[]> {
  if (takeIds.length === 0) return [];
  const rows: {
    take_id: string;
    author_id: string;
    top_cue: string;
    call: Call;
    scale_id: string | null;
    scale_name: string | null;
    scale_note: string | null;
    tempo: string | null;
    refilm: Refilm | null;
    answered_at: Date;
  }[] = await db('answers')
    .leftJoin('lift_scales', (on) =>
      on.on('lift_scales.gym_id', 'answers.gym_id').andOn('lift_scales.id', 'answers.scale_id'),
    )
    .where('answers.gym_id', gymId)
    .whereIn('answers.take_id', takeIds)
    .select('answers.*', 'lift_scales.name as scale_name', 'lift_scales.note as scale_note');
  return rows.map((row) => ({
    takeId: row.take_id,
    authorId: row.author_id,
    topCue: row.top_cue,
    call: row.call,
    scale:
      row.scale_id === null
        ? null
        : { id: row.scale_id, name: row.scale_name ?? '', note: row.scale_note ?? '' },
    tempo: row.tempo,
    refilm: row.refilm,
    answeredAt: row.answered_at,
  }));
}

export async function insertAnswer(
  trx: Transaction,
  gymId: string,
  answer: Omit<AnswerRow, 'scale' | 'answeredAt'> & { scaleId: string | null },
  now: Date,
): Promise<void> {
  await trx('answers').insert({
    take_id: answer.takeId,
    gym_id: gymId,
    author_id: answer.authorId,
    top_cue: answer.topCue,
    call: answer.call,
    scale_id: answer.scaleId,
    tempo: answer.tempo,
    refilm: answer.refilm === null ? null : JSON.stringify(answer.refilm),
    answered_at: now,
  });
}

export interface ReplyRow {
  readonly id: string;
  readonly takeId: string;
  readonly authorId: string;
  readonly body: string;
  readonly createdAt: Date;
}

/** Replies to the answers of the takes, oldest first. */
export async function repliesOf(db: Db, gymId: string, takeIds: readonly string[]): Promise<ReplyRow[]> {
  const rows: { id: string; take_id: string; author_id: string; body: string; created_at: Date }[] = await db(
    'replies',
  )
    .where('gym_id', gymId)
    .whereIn('take_id', takeIds)
    .orderBy('created_at')
    .orderBy('id');
  return rows.map((row) => ({
    id: row.id,
    takeId: row.take_id,
    authorId: row.author_id,
    body: row.body,
    createdAt: row.created_at,
  }));
}

export async function insertReply(trx: Transaction, gymId: string, reply: ReplyRow): Promise<void> {
  await trx('replies').insert({
    id: reply.id,
    gym_id: gymId,
    take_id: reply.takeId,
    author_id: reply.authorId,
    body: reply.body,
    created_at: reply.createdAt,
  });
}
