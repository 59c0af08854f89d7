import * as z from 'zod';
import type {
  AssignmentDetailDto,
  AssignmentDto,
  Page,
  ParsedBodyOf,
  Person,
  TakeDto,
  libraryRoutes,
} from '../../contract';
import { inTransaction, type Database, type Transaction } from '../../platform/database';
import { notFound, refused } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { decodeCursor, encodeCursor } from '../../platform/http/paging';
import { newId } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import { listedLift } from '../lifts';
import { notify } from '../notices';
import { membersOf } from '../people';
import { assignmentDtos } from './assignment-dtos';
import * as repository from './assignments-repository';
import { filmedCounts, filmedTakes } from './filmed-query';

type NewAssignment = ParsedBodyOf<typeof libraryRoutes.createAssignment>;

export interface AssignmentsDeps {
  /** A member's takes of the assignments, oldest first. */
  takesOf(
    db: Database | Transaction,
    gymId: string,
    memberId: string,
    assignmentIds: readonly string[],
  ): Promise<TakeDto[]>;
}

export interface Assignments {
  list(actor: Actor, query: { limit: number; cursor?: string }): Promise<Page<AssignmentDto>>;
  get(actor: Actor, id: string): Promise<AssignmentDetailDto>;
  create(actor: Actor, assignment: NewAssignment): Promise<AssignmentDto>;
  close(actor: Actor, id: string): Promise<AssignmentDto>;
  reopen(actor: Actor, id: string): Promise<AssignmentDto>;
}

const Cursor = z.tuple([z.iso.datetime(), z.string().max(64)]);

export function createAssignments(platform: Platform, deps: AssignmentsDeps): Assignments {
  const { database, clock } = platform;

  /** A member sees the own takes and not who else was asked; staff see how many were asked and have filmed. */
  const forReader = async (
    db: Database | Transaction,
    actor: Actor,
    dtos: readonly AssignmentDto[],
  ): Promise<AssignmentDto[]> => {
    const ids = dtos.map((dto) => dto.id);
    if (actor.role === 'member') {
      const takes = await deps.takesOf(db, actor.gymId, actor.userId, ids);
      return dtos.map((dto) => ({
        ...dto,
        audience: 'all' in dto.audience ? dto.audience : { memberIds: [actor.userId] },
        myTakes: takes.filter((take) => take.assignmentId === dto.id),
      }));
    }
    const [members, filmed] = await Promise.all([
      membersOf(db, actor.gymId),
      filmedCounts(db, actor.gymId, ids),
    ]);
    return dtos.map((dto) => ({
      ...dto,
      counts: { asked: askedOf(dto, members).length, filmed: filmed.get(dto.id) ?? 0 },
    }));
  };

  const askedOf = (dto: AssignmentDto, members: readonly Person[]): readonly Person[] => {
    if ('all' in dto.audience) return members;
    const named = new Set(dto.audience.memberIds);
    return members.filter((member) => named.has(member.id));
  };

  const one = async (
    db: Database | Transaction,
    actor: Actor,
    row: repository.AssignmentRow,
  ): Promise<AssignmentDto> => {
    const [dto] = await forReader(db, actor, await assignmentDtos(db, actor.gymId, [row]));
    if (!dto) throw notFound('That assignment');
    return dto;
  };

  const setClosed = (actor: Actor, id: string, closed: boolean): Promise<AssignmentDto> =>
    inTransaction(database, async (trx) => {
      const now = clock.now();
      const row = await repository.lockAssignment(trx, actor.gymId, id);
      if (!row) throw notFound('That assignment');
      if ((row.closedAt !== null) === closed) return one(trx, actor, row);
      const closedAt = closed ? now : null;
      await repository.setClosed(trx, actor.gymId, id, closedAt);
      await tellChanged(trx, actor, now);
      return one(trx, actor, { ...row, closedAt });
    });

  /** Members' Today and the coaches' list read again. */
  const tellChanged = (trx: Transaction, actor: Actor, now: Date): Promise<void> =>
    recordEvent(
      trx,
      {
        gymId: actor.gymId,
        type: 'assignment.created',
        actorId: actor.userId,
        to: { staff: true, all: true },
      },
      now,
    );

  return {
    async list(actor, query) {
      const after = query.cursor === undefined ? null : decodeCursor(query.cursor, Cursor);
      const rows = await repository.listAssignments(
        database,
        actor.gymId,
        actor.role === 'member' ? actor.userId : null,
        after && { at: new Date(after[0]), id: after[1] },
        query.limit + 1,
      );
      const page = rows.slice(0, query.limit);
      const last = page.at(-1);
      return {
        items: await forReader(database, actor, await assignmentDtos(database, actor.gymId, page)),
        next:
          rows.length > page.length && last ? encodeCursor([last.createdAt.toISOString(), last.id]) : null,
      };
    },

    async get(actor, id) {
      const [row] = await repository.findAssignments(database, actor.gymId, [id]);
      const [whole] = row ? await assignmentDtos(database, actor.gymId, [row]) : [];
      if (!whole) throw notFound('That assignment');
      const asked = askedOf(whole, await membersOf(database, actor.gymId));
      const [dto] = await forReader(database, actor, [whole]);
      if (!dto) throw notFound('That assignment');
      if (actor.role === 'member') {
        // Whoever filmed for it keeps seeing it, also when no longer asked.
        if (!asked.some((member) => member.id === actor.userId) && dto.myTakes.length === 0) {
          throw notFound('That assignment');
        }
        return { ...dto, asked: [] };
      }
      const takes = await filmedTakes(database, actor.gymId, id, clock.now());
      return {
        ...dto,
        asked: asked.map((member) => {
          const own = takes.filter((take) => take.memberId === member.id);
          const latest = own.at(-1);
          return {
            member,
            takes: own.length,
            latest: latest
              ? {
                  takeId: latest.takeId,
                  number: latest.number,
                  state: latest.state,
                  submittedAt: latest.submittedAt?.toISOString() ?? null,
                }
              : null,
          };
        }),
      };
    },

    create: (actor, assignment) =>
      inTransaction(database, async (trx) => {
        const { gymId } = actor;
        const now = clock.now();
        const lift = await listedLift(trx, gymId, assignment.liftId);
        if (!lift) {
          throw refused('no-such-lift', 'Choose a lift of your gym’s library.', [
            { path: 'liftId', message: 'This lift is not in your library.' },
          ]);
        }
        const scaleId = assignment.untilAnsweredScaleId ?? null;
        if (scaleId !== null && !lift.scales.some((scale) => scale.id === scaleId)) {
          throw refused('not-of-this-lift', 'Choose a scale of this lift.', [
            { path: 'untilAnsweredScaleId', message: 'This scale is not on the lift’s list.' },
          ]);
        }
        const named = 'memberIds' in assignment.audience ? [...new Set(assignment.audience.memberIds)] : null;
        const asked = await membersOf(trx, gymId, named ?? undefined);
        if (named && asked.length !== named.length) {
          throw refused('no-such-member', 'One of those you chose is not an active member. Choose again.', [
            { path: 'audience', message: 'One of those you chose is not an active member.' },
          ]);
        }
        const row: repository.AssignmentRow = {
          id: newId(),
          liftId: lift.id,
          title: assignment.title,
          note: assignment.note ?? null,
          load: assignment.load ?? null,
          reps: assignment.reps ?? null,
          rounds: assignment.rounds ?? null,
          trainAt: assignment.trainAt ? new Date(assignment.trainAt) : null,
          untilAnsweredScaleId: scaleId,
          forAll: named === null,
          createdBy: actor.userId,
          createdAt: now,
          closedAt: null,
        };
        await repository.insertAssignment(trx, gymId, row, named ?? []);
        await tellChanged(trx, actor, now);
        await notify(
          trx,
          {
            gymId,
            userIds: asked.map((member) => member.id),
            kind: 'assignment',
            title: `Film your ${lift.name.toLowerCase()}`,
            body: `${actor.name} asks: ${row.title}`,
            link: `/filming/${row.id}`,
          },
          now,
        );
        return one(trx, actor, row);
      }),

    close: (actor, id) => setClosed(actor, id, true),
    reopen: (actor, id) => setClosed(actor, id, false),
  };
}
