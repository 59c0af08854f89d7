import type { ReplyDto, TakeDetailDto } from '../../contract/answers';
import type { View } from '../../contract/common';
import type { ParsedBodyOf } from '../../contract/route';
import type * as boardRoutes from '../../contract/routes/board';
import { webVtt } from '../../calc/captions';
import { inTransaction, type Transaction } from '../../platform/database';
import { conflict, refused } from '../../platform/errors';
import type { Actor } from '../../platform/http/actor';
import { newId } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import { liftToJudgeBy } from '../lifts';
import { mails, notify, sendMailLater } from '../notices';
import { contactOf, names, staffOf } from '../people';
import { heldTake } from '../queue';
import { loadVisible, lockedTake, mayBeSeen, setAnswered, tellTake, wordsFor, type TakeRow } from '../takes';
import { replyDto } from './answer-dtos';
import { insertAnswer, insertReply } from './answers-repository';
import { commentsOf, deleteDraft } from './board-repository';

/** How long the caption of a comment at one instant stays, ms. */
const CAPTION_MS = 3000;

export interface AnswersDeps {
  /** The take with all that the actor may see. */
  detailOf(actor: Actor, takeId: string): Promise<TakeDetailDto>;
}

export interface AnswersService {
  send(
    actor: Actor,
    takeId: string,
    answer: ParsedBodyOf<typeof boardRoutes.sendAnswer>,
  ): Promise<TakeDetailDto>;
  reply(actor: Actor, takeId: string, body: string): Promise<ReplyDto>;
  /** WebVTT of the comments on one view: for members what was sent, for coaches also what is not yet. */
  captions(actor: Actor, takeId: string, view: View): Promise<string>;
}

export function createAnswersService(platform: Platform, deps: AnswersDeps): AnswersService {
  const { database, clock, config } = platform;

  const mustBeScaleOf = async (trx: Transaction, take: TakeRow, scaleId: string) => {
    const lift = await liftToJudgeBy(trx, take.gymId, take.liftId);
    if (!lift?.scales.some((scale) => scale.id === scaleId)) {
      throw refused('not-of-this-lift', 'That scale is not one of this lift’s. Choose another.', [
        { path: 'scaleId', message: 'Choose a scale of this lift.' },
      ]);
    }
  };

  const tellMember = async (trx: Transaction, actor: Actor, take: TakeRow, topCue: string, now: Date) => {
    const { member, lift } = await wordsFor(trx, take);
    const link = `/answers/${take.id}`;
    await notify(
      trx,
      {
        gymId: take.gymId,
        userIds: [take.memberId],
        kind: 'take-answered',
        title: `${actor.name} answered your ${lift.toLowerCase()}`,
        body: topCue,
        link,
      },
      now,
    );
    const mail = mails.takeAnswered({
      memberName: member,
      coachName: actor.name,
      liftName: lift,
      topCue,
      link: `${config.publicUrl}${link}`,
    });
    const contact = await contactOf(trx, take.gymId, take.memberId);
    if (contact) await sendMailLater(trx, contact.email, mail, now);
  };

  /** A member's words reach the coach who answered, or all coaches once that one has left; a coach's the member. */
  const tellOther = async (trx: Transaction, actor: Actor, take: TakeRow, body: string, now: Date) => {
    const fromMember = actor.role === 'member';
    const staff = fromMember ? (await staffOf(trx, take.gymId)).map((coach) => coach.id) : [];
    const coaches = take.answeredBy && staff.includes(take.answeredBy) ? [take.answeredBy] : staff;
    const { lift } = await wordsFor(trx, take);
    await notify(
      trx,
      {
        gymId: take.gymId,
        userIds: fromMember ? coaches : [take.memberId],
        kind: 'take-replied',
        title: `${actor.name} wrote back about the ${lift.toLowerCase()}`,
        body,
        link: fromMember ? `/board/${take.id}` : `/answers/${take.id}`,
      },
      now,
    );
  };

  return {
    async send(actor, takeId, answer) {
      await inTransaction(database, async (trx) => {
        const now = clock.now();
        const take = await heldTake(trx, actor, takeId, now);
        await mayBeSeen(trx, actor, take, now);
        const scaleId = answer.call === 'scale' ? (answer.scaleId ?? null) : null;
        if (scaleId) await mustBeScaleOf(trx, take, scaleId);
        await insertAnswer(
          trx,
          actor.gymId,
          {
            takeId,
            authorId: actor.userId,
            topCue: answer.topCue,
            call: answer.call,
            scaleId,
            tempo: answer.tempo ?? null,
            refilm: answer.refilm
              ? {
                  views: [...new Set(answer.refilm.views)],
                  by: answer.refilm.by ?? null,
                  note: answer.refilm.note ?? null,
                }
              : null,
          },
          now,
        );
        await setAnswered(trx, actor.gymId, takeId, actor.userId, now);
        await deleteDraft(trx, actor.gymId, takeId);
        await tellTake(trx, take, 'take.answered', actor.userId, now);
        await tellMember(trx, actor, take, answer.topCue, now);
      });
      return deps.detailOf(actor, takeId);
    },

    async reply(actor, takeId, body) {
      await loadVisible(database, actor, takeId);
      return inTransaction(database, async (trx) => {
        const now = clock.now();
        const take = await lockedTake(trx, actor.gymId, takeId);
        if (take.state !== 'answered') {
          throw conflict('not-answered', 'There is no answer to write back to yet.');
        }
        const reply = { id: newId(), takeId, authorId: actor.userId, body, createdAt: now };
        await insertReply(trx, actor.gymId, reply);
        await tellTake(trx, take, 'take.replied', actor.userId, now);
        await tellOther(trx, actor, take, body, now);
        return replyDto(reply, await names(trx, actor.gymId, [actor.userId]));
      });
    },

    async captions(actor, takeId, view) {
      const take = await loadVisible(database, actor, takeId);
      await mayBeSeen(database, actor, take, clock.now());
      if (actor.role === 'member' && take.state !== 'answered') return webVtt([]);
      const comments = await commentsOf(database, actor.gymId, [takeId]);
      return webVtt(
        comments
          .filter((comment) => comment.view === view)
          .map((comment) => ({
            startMs: comment.atMs,
            endMs: comment.endMs ?? comment.atMs + CAPTION_MS,
            text: comment.body,
          })),
      );
    },
  };
}
