import type { NotificationDto } from '../../contract/live';
import type { Database, Transaction } from '../../platform/database';

interface Row {
  id: string;
  kind: NotificationDto['kind'];
  title: string;
  body: string;
  link: string;
  created_at: Date;
  read_at: Date | null;
}

/** Notices kept for a person. */
const KEPT = 50;

export async function listNotices(db: Database, gymId: string, userId: string): Promise<NotificationDto[]> {
  const rows: Row[] = await db('notifications')
    .where({ gym_id: gymId, user_id: userId })
    .orderBy([
      { column: 'created_at', order: 'desc' },
      { column: 'id', order: 'desc' },
    ])
    .limit(KEPT);
  return rows.map((row) => ({
    id: row.id,
    kind: row.kind,
    title: row.title,
    body: row.body,
    link: row.link,
    at: row.created_at.toISOString(),
    readAt: row.read_at?.toISOString() ?? null,
  }));
}

export async function countUnread(db: Database, gymId: string, userId: string): Promise<number> {
  const row = await db('notifications')
    .where({ gym_id: gymId, user_id: userId })
    .whereNull('read_at')
    .count({ n: '*' })
    .first();
  return Number(row?.n ?? 0);
}

/** Marks notices read; all of them when `ids` is null. */
export async function markNoticesRead(
  db: Database,
  gymId: string,
  userId: string,
  ids: readonly string[] | null,
  now: Date,
): Promise<void> {
  const unread = db('notifications').where({ gym_id: gymId, user_id: userId }).whereNull('read_at');
  await (ids ? unread.whereIn('id', [...ids]) : unread).update({ read_at: now });
}

export interface NoticeRow {
  readonly id: string;
  readonly gymId: string;
  readonly userId: string;
  readonly kind: NotificationDto['kind'];
  readonly title: string;
  readonly body: string;
  readonly link: string;
}

export async function insertNotices(
  trx: Transaction | Database,
  rows: readonly NoticeRow[],
  now: Date,
): Promise<void> {
  if (rows.length === 0) return;
  await trx('notifications').insert(
    rows.map((row) => ({
      id: row.id,
      gym_id: row.gymId,
      user_id: row.userId,
      kind: row.kind,
      title: row.title.slice(0, 160),
      body: row.body.slice(0, 500),
      link: row.link,
      created_at: now,
    })),
  );
}

/**
 * Deletes what was told to a person, what was told to others about the takes named, and mails to the address
 * that are still kept.
 */
export async function forgetNotices(
  trx: Transaction,
  gymId: string,
  person: { readonly userId: string; readonly email: string; readonly takeIds: readonly string[] },
): Promise<void> {
  await trx('notifications').where({ gym_id: gymId, user_id: person.userId }).delete();
  for (const takeId of person.takeIds) {
    await trx('notifications')
      .where('gym_id', gymId)
      .whereIn('link', [`/board/${takeId}`, `/answers/${takeId}`])
      .delete();
  }
  await trx('jobs')
    .where('type', 'mail.send')
    .whereRaw("JSON_VALUE(payload, '$.to') = ?", [person.email])
    .delete();
}
