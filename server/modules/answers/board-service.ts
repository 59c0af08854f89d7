import type { BoardDto, CommentDto, DraftAnswer, MarkDto, MeasureDto, RepMark } from '../../contract/answers';
import type { ParsedBodyOf } from '../../contract/route';
import type * as boardRoutes from '../../contract/routes/board';
import { measure } from '../../calc/geometry';
import { inTransaction, type Transaction } from '../../platform/database';
import { conflict, forbidden, notFound, refused } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { newId } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import { assignmentsByIds } from '../assignments';
import { liftsByIds, liftToJudgeBy } from '../lifts';
import { findUser, names } from '../people';
import { heldTake } from '../queue';
import { clipsOfTakes, handedInTakes, loadVisible, mayBeSeen, takeDtos, type TakeRow } from '../takes';
import { answersOf, commentDto, measureDto, notesOn, repMarksDtos, type RepMarksDto } from './answer-dtos';
import * as repository from './board-repository';

/** Earlier takes shown beside the one at hand. */
const EARLIER_TAKES = 10;

export interface BoardService {
  board(actor: Actor, takeId: string): Promise<BoardDto>;
  addComment(
    actor: Actor,
    takeId: string,
    comment: ParsedBodyOf<typeof boardRoutes.addComment>,
  ): Promise<CommentDto>;
  changeComment(
    actor: Actor,
    commentId: string,
    change: ParsedBodyOf<typeof boardRoutes.changeComment>,
  ): Promise<CommentDto>;
  deleteComment(actor: Actor, commentId: string): Promise<void>;
  putMarks(
    actor: Actor,
    takeId: string,
    body: ParsedBodyOf<typeof boardRoutes.putMarks>,
  ): Promise<{ marks: MarkDto[] }>;
  addMeasure(
    actor: Actor,
    takeId: string,
    body: ParsedBodyOf<typeof boardRoutes.addMeasure>,
  ): Promise<MeasureDto>;
  deleteMeasure(actor: Actor, measureId: string): Promise<void>;
  putRepMarks(actor: Actor, clipId: string, marks: readonly RepMark[]): Promise<RepMarksDto>;
  putDraft(actor: Actor, takeId: string, draft: DraftAnswer): Promise<DraftAnswer>;
}

export function createBoard(platform: Platform): BoardService {
  const { database, clock } = platform;

  /** Runs `work` on a take that the actor has picked up, and tells other boards. */
  const write = <T>(
    actor: Actor,
    takeId: string,
    work: (trx: Transaction, take: TakeRow, now: Date) => Promise<T>,
  ): Promise<T> =>
    inTransaction(database, async (trx) => {
      const now = clock.now();
      const take = await heldTake(trx, actor, takeId, now);
      await mayBeSeen(trx, actor, take, now);
      const result = await work(trx, take, now);
      await recordEvent(
        trx,
        {
          gymId: actor.gymId,
          type: 'board.changed',
          actorId: actor.userId,
          takeId,
          to: { staff: true },
        },
        now,
      );
      return result;
    });

  const clipOf = async (trx: Transaction, take: TakeRow, clipId: string, ...instants: (number | null)[]) => {
    const clip = (await clipsOfTakes(trx, take.gymId, [take.id])).find((row) => row.id === clipId);
    if (!clip) throw refused('not-of-this-take', 'That clip does not belong to this take.');
    const last = Math.max(...instants.map((instant) => instant ?? 0));
    if (clip.durationMs !== null && last > clip.durationMs) {
      throw refused(
        'after-the-end',
        `The clip ends at ${clip.durationMs} ms. Choose an instant before that.`,
      );
    }
    return clip;
  };

  const mustBeFaultsOf = async (trx: Transaction, take: TakeRow, faultIds: readonly string[]) => {
    if (faultIds.length === 0) return;
    const lift = (await liftsByIds(trx, take.gymId, [take.liftId])).get(take.liftId);
    const known = new Set(lift?.faults.map((fault) => fault.id));
    if (!faultIds.every((id) => known.has(id))) {
      throw refused('not-of-this-lift', 'That fault is not on this lift’s list. Reload the board.');
    }
  };

  const commentOf = async (trx: Transaction, gymId: string, commentId: string) => {
    const comment = await repository.findComment(trx, gymId, commentId);
    if (!comment) throw notFound('That comment');
    return comment;
  };

  /** Looks up whose take it is before the write takes hold of it. */
  const takeIdOf = async (found: Promise<{ takeId: string } | null>, what: string): Promise<string> => {
    const row = await found;
    if (!row) throw notFound(what);
    return row.takeId;
  };

  const ownComment = async (trx: Transaction, actor: Actor, commentId: string) => {
    const comment = await commentOf(trx, actor.gymId, commentId);
    if (comment.authorId !== actor.userId) {
      throw forbidden('This comment is another coach’s. Write one of your own beside it.');
    }
    return comment;
  };

  return {
    async board(actor, takeId) {
      const { gymId } = actor;
      const now = clock.now();
      const take = await loadVisible(database, actor, takeId);
      await mayBeSeen(database, actor, take, now);
      const earlier = (await handedInTakes(database, gymId, take.memberId, take.liftId))
        .filter((row) => row.id !== takeId && row.createdAt < take.createdAt)
        .reverse()
        .slice(0, EARLIER_TAKES);
      const [[dto, ...earlierDtos], lift, assignments, member, notes, draft, answers] = await Promise.all([
        takeDtos(database, gymId, [take, ...earlier], now),
        take.state === 'answered'
          ? liftsByIds(database, gymId, [take.liftId]).then((lifts) => lifts.get(take.liftId))
          : liftToJudgeBy(database, gymId, take.liftId),
        assignmentsByIds(database, gymId, [take.assignmentId]),
        findUser(database, gymId, take.memberId, now),
        notesOn(database, gymId, [takeId]),
        repository.findDraft(database, gymId, takeId),
        answersOf(
          database,
          gymId,
          [take, ...earlier].map((row) => row.id),
        ),
      ]);
      const assignment = assignments.get(take.assignmentId);
      if (!dto || !lift || !assignment) throw notFound('That take');
      return {
        take: dto,
        member: { ...dto.member, kit: member?.kit ?? null },
        lift,
        assignment,
        clips: dto.clips,
        comments: notes.commentsOn(takeId),
        marks: notes.marksOn(takeId),
        measures: notes.measuresOn(takeId),
        repMarks: await repMarksDtos(
          database,
          gymId,
          dto.clips.map((clip) => clip.id),
        ),
        draft,
        answer: answers.get(takeId) ?? null,
        earlierTakes: earlierDtos.map((earlierTake) => ({
          take: earlierTake,
          answer: answers.get(earlierTake.id) ?? null,
        })),
      };
    },

    addComment: (actor, takeId, comment) =>
      write(actor, takeId, async (trx, take, now) => {
        const clip = await clipOf(trx, take, comment.clipId, comment.atMs, comment.endMs ?? null);
        await mustBeFaultsOf(trx, take, comment.faultId ? [comment.faultId] : []);
        const row = {
          id: newId(),
          takeId,
          clipId: clip.id,
          authorId: actor.userId,
          atMs: comment.atMs,
          endMs: comment.endMs ?? null,
          body: comment.body,
          drawing: comment.drawing ?? null,
          faultId: comment.faultId ?? null,
        };
        await repository.insertComment(trx, actor.gymId, row, now);
        const people = await names(trx, actor.gymId, [actor.userId]);
        return commentDto({ ...row, view: clip.view, createdAt: now }, people);
      }),

    async changeComment(actor, commentId, change) {
      const takeId = await takeIdOf(repository.findComment(database, actor.gymId, commentId), 'That comment');
      return write(actor, takeId, async (trx, take) => {
        const before = await ownComment(trx, actor, commentId);
        const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined));
        const after = { ...before, ...given };
        if (after.endMs !== null && after.endMs <= after.atMs) {
          throw refused('span', 'A span ends after it starts.', [
            { path: 'endMs', message: 'A span ends after it starts.' },
          ]);
        }
        await clipOf(trx, take, after.clipId, after.atMs, after.endMs);
        await mustBeFaultsOf(trx, take, change.faultId ? [change.faultId] : []);
        await repository.updateComment(trx, actor.gymId, commentId, after);
        return commentDto(after, await names(trx, actor.gymId, [actor.userId]));
      });
    },

    async deleteComment(actor, commentId) {
      const takeId = await takeIdOf(repository.findComment(database, actor.gymId, commentId), 'That comment');
      await write(actor, takeId, async (trx) => {
        await ownComment(trx, actor, commentId);
        await repository.removeComment(trx, actor.gymId, commentId);
      });
    },

    putMarks: (actor, takeId, { marks }) =>
      write(actor, takeId, async (trx, take) => {
        const faultIds = marks.map((mark) => mark.faultId);
        if (new Set(faultIds).size !== faultIds.length) {
          throw refused('marked-twice', 'Mark each fault once.');
        }
        await mustBeFaultsOf(trx, take, faultIds);
        const kept = marks.map((mark) => ({
          faultId: mark.faultId,
          mark: mark.mark,
          clipId: mark.clipId ?? null,
          atMs: mark.atMs ?? null,
        }));
        for (const mark of kept) if (mark.clipId) await clipOf(trx, take, mark.clipId, mark.atMs);
        await repository.replaceMarks(trx, actor.gymId, takeId, actor.userId, kept);
        return { marks: (await notesOn(trx, actor.gymId, [takeId])).marksOn(takeId) };
      }),

    addMeasure: (actor, takeId, body) =>
      write(actor, takeId, async (trx, take, now) => {
        const clip = await clipOf(trx, take, body.clipId, body.atMs);
        await mustBeFaultsOf(trx, take, body.faultId ? [body.faultId] : []);
        const measured = measure(body.kind, body.points, {
          width: clip.width ?? 0,
          height: clip.height ?? 0,
        });
        if (!measured.ok && measured.reason === 'no-size') {
          throw conflict('not-ready', 'This clip cannot be measured before it is ready.');
        }
        if (!measured.ok) {
          throw refused(
            measured.reason,
            'Two of the points lie on each other, so there is no angle. Set them further apart.',
            [{ path: 'points', message: 'Set the points further apart.' }],
          );
        }
        const row = {
          id: newId(),
          takeId,
          clipId: clip.id,
          authorId: actor.userId,
          atMs: body.atMs,
          kind: body.kind,
          points: body.points,
          faultId: body.faultId ?? null,
          value: measured.value,
          plusMinus: measured.plusMinus,
        };
        await repository.insertMeasure(trx, actor.gymId, row, now);
        return measureDto(row, await names(trx, actor.gymId, [actor.userId]));
      }),

    async deleteMeasure(actor, measureId) {
      const takeId = await takeIdOf(repository.findMeasure(database, actor.gymId, measureId), 'That measure');
      await write(actor, takeId, (trx) => repository.removeMeasure(trx, actor.gymId, measureId));
    },

    async putRepMarks(actor, clipId, marks) {
      const takeId = await repository.takeOfClip(database, actor.gymId, clipId);
      if (!takeId) throw notFound('That clip');
      return write(actor, takeId, async (trx, take) => {
        await clipOf(trx, take, clipId, ...marks.map((mark) => mark.atMs));
        if (new Set(marks.map((mark) => mark.atMs)).size !== marks.length) {
          throw refused('marked-twice', 'Two rep marks stand at the same instant. Remove one.');
        }
        await repository.replaceRepMarks(trx, actor.gymId, clipId, actor.userId, marks);
        const [dto] = await repMarksDtos(trx, actor.gymId, [clipId]);
        if (!dto) throw notFound('That clip');
        return dto;
      });
    },

    putDraft: (actor, takeId, draft) =>
      inTransaction(database, async (trx) => {
        const now = clock.now();
        await heldTake(trx, actor, takeId, now);
        await repository.saveDraft(trx, actor.gymId, takeId, actor.userId, draft, now);
        return draft;
      }),
  };
}
