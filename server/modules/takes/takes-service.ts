import * as z from 'zod';
import type { AnswerDto, ProgressDto, TakeDetailDto } from '../../contract/answers';
import type { Page, View } from '../../contract/common';
import type { ParsedBodyOf, QueryOf } from '../../contract/route';
import type * as takeRoutes from '../../contract/routes/takes';
import type { AssignmentDto, TakeDto } from '../../contract/takes';
import { inTransaction, isDuplicate, type Database, type Transaction } from '../../platform/database';
import { conflict, malformed, notFound } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { decodeCursor, encodeCursor } from '../../platform/http/paging';
import { newId } from '../../platform/ids';
import { enqueueJob } from '../../platform/jobs';
import type { Platform } from '../../platform/platform';
import { liftsByIds } from '../lifts';
import { names } from '../people';
import { takeDtos } from './take-dtos';
import { clipsOfTakes, deleteClipsOfTake, resetUnplayableClips } from './take-clips-repository';
import { lockedTake, takeOf, tellTake, waitWhenReady } from './take-flow';
import type { TakeRow } from './take-row';
import { assignmentOf, submitTake } from './take-submission';
import { loadVisible } from './take-visibility';
import * as repository from './takes-repository';

export interface TakesDeps {
  /** The answers sent to the takes, by take. */
  answersOf(
    db: Database | Transaction,
    gymId: string,
    takeIds: readonly string[],
  ): Promise<ReadonlyMap<string, AnswerDto>>;
}

type Words = ParsedBodyOf<typeof takeRoutes.createTake>;

export interface TakesService {
  create(actor: Actor, assignmentId: string, words: Words): Promise<TakeDto>;
  change(actor: Actor, takeId: string, words: Words): Promise<TakeDto>;
  submit(actor: Actor, takeId: string): Promise<TakeDto>;
  withdraw(actor: Actor, takeId: string): Promise<TakeDto>;
  retry(actor: Actor, takeId: string): Promise<TakeDto>;
  get(actor: Actor, takeId: string): Promise<TakeDetailDto>;
  list(actor: Actor, query: QueryOf<typeof takeRoutes.listTakes>): Promise<Page<TakeDto>>;
  markRead(actor: Actor, takeId: string): Promise<void>;
  progress(actor: Actor, memberId: string | undefined): Promise<ProgressDto>;
  /** A member's takes of the assignments, oldest first. */
  takesOf(
    db: Database | Transaction,
    gymId: string,
    memberId: string,
    assignmentIds: readonly string[],
  ): Promise<TakeDto[]>;
}

const Cursor = z.tuple([z.iso.datetime(), z.string().max(64)]);

const wordsOf = ({ neededBy, ...words }: Words): repository.TakeWords => ({
  ...words,
  neededBy: neededBy ? new Date(neededBy) : neededBy === null ? null : undefined,
});

const isAsked = (assignment: AssignmentDto, memberId: string) =>
  'all' in assignment.audience || assignment.audience.memberIds.includes(memberId);

/** A member is not told who else was asked. */
const forReader = (assignment: AssignmentDto, actor: Actor): AssignmentDto =>
  actor.role === 'member' && 'memberIds' in assignment.audience
    ? { ...assignment, audience: { memberIds: [actor.userId] } }
    : assignment;

export function createTakes(platform: Platform, deps: TakesDeps): TakesService {
  const { database, clock } = platform;

  const dtoOf = async (db: Database | Transaction, gymId: string, takeId: string): Promise<TakeDto> => {
    const [dto] = await takeDtos(db, gymId, [await takeOf(db, gymId, takeId)], clock.now());
    if (!dto) throw notFound('That take');
    return dto;
  };

  /** Runs `work` on the caller's own take, held against other changes, and answers with the take after it. */
  const changeOwn = (
    actor: Actor,
    takeId: string,
    work: (trx: Transaction, take: TakeRow, now: Date) => Promise<void>,
  ): Promise<TakeDto> =>
    inTransaction(database, async (trx) => {
      const take = await lockedTake(trx, actor.gymId, takeId);
      if (take.memberId !== actor.userId) throw notFound('That take');
      await work(trx, take, clock.now());
      return dtoOf(trx, actor.gymId, takeId);
    });

  /** The views to film: those of the last answer's refilm request, else the brief's. */
  const viewsFor = async (
    trx: Transaction,
    assignment: AssignmentDto,
    gymId: string,
    takes: readonly TakeRow[],
  ): Promise<readonly View[]> => {
    const lastAnswered = takes.filter((take) => take.state === 'answered').at(-1);
    if (!lastAnswered) return assignment.lift.brief.views;
    const answer = (await deps.answersOf(trx, gymId, [lastAnswered.id])).get(lastAnswered.id);
    return answer?.refilm?.views ?? assignment.lift.brief.views;
  };

  const createOnce = (actor: Actor, assignmentId: string, words: Words): Promise<TakeDto> =>
    inTransaction(database, async (trx) => {
      const { gymId, userId } = actor;
      const assignment = await assignmentOf(trx, gymId, assignmentId);
      if (!isAsked(assignment, userId)) throw notFound('That assignment');
      const takes = await repository.takesOfAssignments(trx, gymId, userId, [assignmentId]);
      const open = takes.find((take) => take.state === 'draft');
      if (open) {
        await repository.updateWords(trx, gymId, open.id, wordsOf(words));
        return dtoOf(trx, gymId, open.id);
      }
      if (assignment.closedAt) {
        throw conflict('assignment-closed', 'Your coach has closed this assignment. Ask for a new one.');
      }
      const id = newId();
      const now = clock.now();
      await repository.insertDraft(
        trx,
        {
          id,
          gymId,
          assignmentId,
          liftId: assignment.lift.id,
          memberId: userId,
          number: (takes.at(-1)?.number ?? 0) + 1,
          previousTakeId: takes.filter((take) => take.state !== 'withdrawn').at(-1)?.id ?? null,
          views: await viewsFor(trx, assignment, gymId, takes),
        },
        wordsOf(words),
        now,
      );
      // Coaches hear of a take when it is handed in.
      await recordEvent(
        trx,
        { gymId, type: 'take.created', actorId: userId, takeId: id, to: { staff: false, userId } },
        now,
      );
      return dtoOf(trx, gymId, id);
    });

  return {
    async create(actor, assignmentId, words) {
      try {
        return await createOnce(actor, assignmentId, words);
      } catch (error) {
        // Two calls at once want the same number; the second finds the first one's draft.
        if (!isDuplicate(error)) throw error;
        return createOnce(actor, assignmentId, words);
      }
    },

    change: (actor, takeId, words) =>
      changeOwn(actor, takeId, async (trx, take) => {
        if (take.state !== 'draft' && take.state !== 'unplayable') {
          throw conflict(
            'not-a-draft',
            'This take has been sent. Withdraw it to change it, or film another one.',
          );
        }
        await repository.updateWords(trx, actor.gymId, takeId, wordsOf(words));
      }),

    submit: (actor, takeId) => changeOwn(actor, takeId, submitTake),

    withdraw: (actor, takeId) =>
      changeOwn(actor, takeId, async (trx, take, now) => {
        if (take.state === 'withdrawn') return;
        if (take.state === 'answered') {
          throw conflict('answered', 'This take has been answered and stays with its answer.');
        }
        const clips = await clipsOfTakes(trx, actor.gymId, [takeId]);
        await deleteClipsOfTake(trx, actor.gymId, takeId);
        await repository.setWithdrawn(trx, actor.gymId, takeId);
        if (clips.length > 0) {
          await enqueueJob(
            trx,
            'objects.delete',
            { prefixes: [`gyms/${actor.gymId}/takes/${takeId}/`] },
            now,
          );
        }
        await tellTake(trx, take, 'take.withdrawn', actor.userId, now);
      }),

    retry: (actor, takeId) =>
      inTransaction(database, async (trx) => {
        const take = await lockedTake(trx, actor.gymId, takeId);
        if (actor.role === 'member' && take.memberId !== actor.userId) throw notFound('That take');
        if (take.state !== 'unplayable') {
          throw conflict('not-unplayable', 'Only a take that could not be played can be tried again.');
        }
        const now = clock.now();
        const clips = await clipsOfTakes(trx, actor.gymId, [takeId]);
        const broken = clips.filter((clip) => clip.state === 'unplayable');
        await resetUnplayableClips(trx, actor.gymId, takeId);
        for (const clip of broken) {
          await enqueueJob(trx, 'clip.process', { clipId: clip.id, gymId: actor.gymId }, now, {
            dedupeKey: `clip.process:${clip.id}:${newId()}`,
          });
        }
        await repository.setProcessingAgain(trx, actor.gymId, takeId);
        await tellTake(trx, take, 'take.retried', actor.userId, now);
        await waitWhenReady(trx, await lockedTake(trx, actor.gymId, takeId), now);
        return dtoOf(trx, actor.gymId, takeId);
      }),

    async get(actor, takeId) {
      const { gymId } = actor;
      const take = await loadVisible(database, actor, takeId);
      const [dto, assignment, answers, history] = await Promise.all([
        dtoOf(database, gymId, takeId),
        assignmentOf(database, gymId, take.assignmentId),
        deps.answersOf(database, gymId, [takeId]),
        repository.takeHistory(database, gymId, takeId),
      ]);
      const people = await names(
        database,
        gymId,
        history.flatMap((event) => event.actorId ?? []),
      );
      return {
        ...dto,
        assignment: forReader(assignment, actor),
        answer: answers.get(takeId) ?? null,
        history: history.map((event) => ({
          type: event.type,
          at: event.at.toISOString(),
          by: event.actorId === null ? null : (people.get(event.actorId) ?? null),
        })),
      };
    },

    async list(actor, query) {
      const isMember = actor.role === 'member';
      const after = query.cursor === undefined ? null : decodeCursor(query.cursor, Cursor);
      const now = clock.now();
      if (isMember && query.memberId !== undefined && query.memberId !== actor.userId) throw notFound();
      const rows = await repository.listTakes(
        database,
        actor.gymId,
        {
          memberId: isMember ? actor.userId : query.memberId,
          liftId: query.liftId,
          state: query.state,
          unread: query.unread === undefined ? undefined : query.unread === 'true',
          withoutDrafts: !isMember,
        },
        after && { at: new Date(after[0]), id: after[1] },
        query.limit + 1,
        now,
      );
      const page = rows.slice(0, query.limit);
      const last = page.at(-1);
      return {
        items: await takeDtos(database, actor.gymId, page, now),
        next:
          rows.length > page.length && last ? encodeCursor([last.createdAt.toISOString(), last.id]) : null,
      };
    },

    async markRead(actor, takeId) {
      await changeOwn(actor, takeId, async (trx, take, now) => {
        if (take.state !== 'answered') {
          throw conflict('not-answered', 'There is no answer to read yet.');
        }
        if (await repository.setRead(trx, actor.gymId, takeId, now)) {
          await tellTake(trx, take, 'take.read', actor.userId, now);
        }
      });
    },

    async progress(actor, memberId) {
      const { gymId } = actor;
      const ownOnly = actor.role === 'member';
      if (ownOnly && memberId !== undefined && memberId !== actor.userId) throw notFound('That member');
      const whose = ownOnly ? actor.userId : memberId;
      if (whose === undefined) {
        throw malformed([{ path: 'memberId', message: 'Say whose progress you want to see.' }]);
      }
      const member = (await names(database, gymId, [whose])).get(whose);
      if (!member) throw notFound('That member');
      const rows = await repository.handedInTakes(database, gymId, whose);
      const liftIds = [...new Set(rows.map((row) => row.liftId))];
      const [dtos, answers, lifts] = await Promise.all([
        takeDtos(database, gymId, rows, clock.now()),
        deps.answersOf(
          database,
          gymId,
          rows.map((row) => row.id),
        ),
        liftsByIds(database, gymId, liftIds),
      ]);
      return {
        member,
        lifts: liftIds.flatMap((liftId) => {
          const lift = lifts.get(liftId);
          if (!lift) return [];
          const takes = dtos
            .filter((take) => take.lift.id === liftId)
            .map((take) => {
              const answer = answers.get(take.id);
              return { take, topCue: answer?.topCue ?? null, marks: answer?.marks ?? [] };
            });
          return [{ lift, takes }];
        }),
      };
    },

    async takesOf(db, gymId, memberId, assignmentIds) {
      const rows = await repository.takesOfAssignments(db, gymId, memberId, assignmentIds);
      return takeDtos(db, gymId, rows, clock.now());
    },
  };
}
