import type { NotificationDto } from '../../contract/live';
import type { Database, Transaction } from '../../platform/database';
import { recordEvent } from '../../platform/events';
import { newId } from '../../platform/ids';
import { enqueueJob } from '../../platform/jobs';
import type { Platform } from '../../platform/platform';
import type { RenderedMail } from './mail-layout';
import { countUnread, insertNotices, listNotices, markNoticesRead } from './notices-repository';

export interface NewNotice {
  readonly gymId: string;
  readonly userIds: readonly string[];
  readonly kind: NotificationDto['kind'];
  readonly title: string;
  readonly body: string;
  /** A path of the client. */
  readonly link: string;
}

/** Puts a notice in front of each person, in the transaction of the change it tells. */
export async function notify(trx: Transaction | Database, notice: NewNotice, now: Date): Promise<void> {
  const userIds = [...new Set(notice.userIds)];
  await insertNotices(
    trx,
    userIds.map((userId) => ({ ...notice, id: newId(), userId })),
    now,
  );
  for (const userId of userIds) {
    await recordEvent(
      trx,
      { gymId: notice.gymId, type: 'notification.created', actorId: null, to: { staff: false, userId } },
      now,
    );
  }
}

/** Queues one mail, in the transaction of the change it tells. */
export async function sendMailLater(
  trx: Transaction | Database,
  to: string,
  mail: RenderedMail,
  now: Date,
): Promise<void> {
  await enqueueJob(trx, 'mail.send', { to, subject: mail.subject, text: mail.text, html: mail.html }, now, {
    maxAttempts: 12,
  });
}

export interface Notices {
  list(gymId: string, userId: string): Promise<{ items: NotificationDto[]; unread: number }>;
  markRead(gymId: string, userId: string, ids: readonly string[] | null): Promise<void>;
}

export function createNotices(platform: Platform): Notices {
  return {
    async list(gymId, userId) {
      const [items, unread] = await Promise.all([
        listNotices(platform.database, gymId, userId),
        countUnread(platform.database, gymId, userId),
      ]);
      return { items, unread };
    },
    async markRead(gymId, userId, ids) {
      await markNoticesRead(platform.database, gymId, userId, ids, platform.clock.now());
    },
  };
}
