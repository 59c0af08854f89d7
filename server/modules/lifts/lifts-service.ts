import type { LiftDto, ParsedBodyOf, libraryRoutes } from '../../contract';
import { inTransaction, type Database, type Transaction } from '../../platform/database';
import { conflict, notFound, refused } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { newId } from '../../platform/ids';
import type { Platform } from '../../platform/platform';
import * as repository from './lifts-repository';

type NewLift = ParsedBodyOf<typeof libraryRoutes.createLift>;
type LiftChange = ParsedBodyOf<typeof libraryRoutes.changeLift>;

/** Where a phone stands unless the coach says otherwise (common practice, no source). */
const FIRST_BRIEF = {
  cameraHeightCm: 90,
  cameraDistanceCm: 300,
  inFrame: 'Head, feet and the weight, all through the rep',
  note: '',
};

export interface Lifts {
  list(actor: Actor): Promise<LiftDto[]>;
  get(actor: Actor, id: string): Promise<LiftDto>;
  create(actor: Actor, lift: NewLift): Promise<LiftDto>;
  change(actor: Actor, id: string, change: LiftChange): Promise<LiftDto>;
}

/** Lifts by id, with faults and scales that old answers refer to. */
export async function liftsByIds(
  db: Database | Transaction,
  gymId: string,
  ids: readonly string[],
): Promise<Map<string, LiftDto>> {
  const lifts = ids.length === 0 ? [] : await repository.findLifts(db, gymId, ids, true);
  return new Map(lifts.map((lift) => [lift.id, lift]));
}

/** A lift with the faults and scales that stand on its list now, also when the lift itself is archived: to judge by. */
export async function liftToJudgeBy(
  db: Database | Transaction,
  gymId: string,
  id: string,
): Promise<LiftDto | null> {
  const [lift] = await repository.findLifts(db, gymId, [id], false);
  return lift ?? null;
}

/** A lift as its list stands now, without the faults and scales that were taken off; null when it is archived too. */
export async function listedLift(
  db: Database | Transaction,
  gymId: string,
  id: string,
): Promise<LiftDto | null> {
  const lift = await liftToJudgeBy(db, gymId, id);
  return lift?.archivedAt === null ? lift : null;
}

export function createLifts(platform: Platform): Lifts {
  const { database, clock } = platform;

  const one = async (db: Database | Transaction, gymId: string, id: string): Promise<LiftDto> => {
    const [lift] = await repository.findLifts(db, gymId, [id], false);
    if (!lift) throw notFound('That lift');
    return lift;
  };
  const mustBeFree = async (trx: Transaction, gymId: string, name: string, except: string | null) => {
    if (await repository.nameIsTaken(trx, gymId, name, except)) {
      throw conflict(
        'name-taken',
        'Your gym has a lift of this name. Change that one, or choose another name.',
      );
    }
  };
  /** An id that is given must be one of this lift's. */
  const parts = (given: readonly { id?: string }[], known: readonly { id: string }[]) =>
    given.map(({ id, ...columns }) => {
      if (id && !known.some((part) => part.id === id)) {
        throw refused(
          'not-of-this-lift',
          'A fault or scale of another lift was named. Reload the page and try again.',
        );
      }
      return { id: id ?? newId(), isNew: !id, columns };
    });
  const put = async (
    trx: Transaction,
    actor: Actor,
    id: string,
    change: LiftChange,
    now: Date,
  ): Promise<LiftDto> => {
    const known = (await liftsByIds(trx, actor.gymId, [id])).get(id);
    if (change.faults)
      await repository.putParts(
        trx,
        'lift_faults',
        actor.gymId,
        id,
        parts(change.faults, known?.faults ?? []),
        now,
      );
    if (change.scales)
      await repository.putParts(
        trx,
        'lift_scales',
        actor.gymId,
        id,
        parts(change.scales, known?.scales ?? []),
        now,
      );
    await recordEvent(
      trx,
      { gymId: actor.gymId, type: 'lifts.changed', actorId: actor.userId, to: { staff: true } },
      now,
    );
    return one(trx, actor.gymId, id);
  };

  return {
    list: (actor) => repository.findLifts(database, actor.gymId, null, false),
    get: (actor, id) => one(database, actor.gymId, id),
    create: (actor, lift) =>
      inTransaction(database, async (trx) => {
        const now = clock.now();
        const id = newId();
        await mustBeFree(trx, actor.gymId, lift.name, null);
        const brief = { ...FIRST_BRIEF, ...lift.brief };
        await repository.insertLift(
          trx,
          actor.gymId,
          id,
          { name: lift.name, pattern: lift.pattern, brief, tempo: lift.tempo ?? null },
          now,
        );
        return put(trx, actor, id, { faults: lift.faults, scales: lift.scales }, now);
      }),
    change: (actor, id, change) =>
      inTransaction(database, async (trx) => {
        const now = clock.now();
        const before = await one(trx, actor.gymId, id);
        // A lift that is put back on the list may meet one that took its name meanwhile.
        if (change.name !== undefined || change.archived === false)
          await mustBeFree(trx, actor.gymId, change.name ?? before.name, id);
        await repository.updateLift(trx, actor.gymId, id, {
          name: change.name,
          pattern: change.pattern,
          tempo: change.tempo,
          brief: change.brief && { ...before.brief, ...change.brief },
          archivedAt: change.archived === undefined ? undefined : change.archived ? now : null,
        });
        return put(trx, actor, id, change, now);
      }),
  };
}
