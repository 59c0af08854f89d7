import { gymOf } from '../modules/gyms';
import { mails, notify, sendMailLater } from '../modules/notices';
import { contactOf, staffOf } from '../modules/people';
import { lockTake, wordsFor } from '../modules/takes';
import type { Handler } from './handler';

/** Warns coaches, in the app and by mail, of a take whose answer is nearly due and that still waits. */
export const warnOfTake: Handler<'take.warn'> = ({ takeId, gymId }, { platform }) => {
  const { clock, config } = platform;
  return Promise.resolve(async (trx) => {
    const now = clock.now();
    const take = await lockTake(trx, gymId, takeId);
    if (take?.state !== 'waiting' || !take.answerBy) return;
    const [gym, words, staff] = await Promise.all([
      gymOf(trx, gymId),
      wordsFor(trx, take),
      staffOf(trx, gymId),
    ]);
    const answerBy = new Intl.DateTimeFormat('en-GB', {
      timeZone: gym.timeZone,
      weekday: 'short',
      hour: '2-digit',
      minute: '2-digit',
    }).format(take.answerBy);
    await notify(
      trx,
      {
        gymId,
        userIds: staff.map((coach) => coach.id),
        kind: 'answer-by-near',
        title: `${words.member} needs an answer by ${answerBy}`,
        body: `${words.lift}, take ${take.number}.`,
        link: `/board/${take.id}`,
      },
      now,
    );
    for (const coach of staff) {
      const contact = await contactOf(trx, gymId, coach.id);
      if (!contact) continue;
      const mail = mails.answerByNear({
        coachName: contact.name,
        memberName: words.member,
        liftName: words.lift,
        answerBy,
        link: `${config.publicUrl}/queue`,
      });
      await sendMailLater(trx, contact.email, mail, now);
    }
  });
};
