import type { Person } from '../../contract/common';
import type { TakeDto } from '../../contract/takes';
import type { Database, Transaction } from '../../platform/database';
import { liftsByIds } from '../lifts';
import { names } from '../people';
import { clipDto, problemOf } from './clip-dto';
import { clipsOfTakes } from './take-clips-repository';
import { holderOf, stateOf, type TakeRow } from './take-row';
import { findTakes } from './takes-repository';

const iso = (at: Date | null) => at?.toISOString() ?? null;

/** Takes as the contract tells them, in the order of `rows`. */
export async function takeDtos(
  db: Database | Transaction,
  gymId: string,
  rows: readonly TakeRow[],
  now: Date,
): Promise<TakeDto[]> {
  if (rows.length === 0) return [];
  const holders = rows.flatMap((row) => holderOf(row, now)?.userId ?? []);
  const [people, lifts, clips] = await Promise.all([
    names(db, gymId, [...rows.map((row) => row.memberId), ...holders]),
    liftsByIds(db, gymId, [...new Set(rows.map((row) => row.liftId))]),
    clipsOfTakes(
      db,
      gymId,
      rows.map((row) => row.id),
    ),
  ]);
  const person = (id: string): Person => people.get(id) ?? { id, name: '' };
  return rows.map((row) => {
    const holder = holderOf(row, now);
    return {
      id: row.id,
      number: row.number,
      state: stateOf(row, now),
      assignmentId: row.assignmentId,
      previousTakeId: row.previousTakeId,
      member: person(row.memberId),
      lift: { id: row.liftId, name: lifts.get(row.liftId)?.name ?? '' },
      views: [...row.views],
      neededBy: iso(row.neededBy),
      load: row.load,
      implement: row.implement,
      note: row.note,
      pain: row.pain,
      atStake: row.atStake,
      answerBy: iso(row.answerBy),
      submittedAt: iso(row.submittedAt),
      answeredAt: iso(row.answeredAt),
      readAt: iso(row.readAt),
      pickedUpBy: holder ? person(holder.userId) : null,
      pickedUpUntil: iso(holder?.until ?? null),
      problem: row.state === 'unplayable' ? problemOf(row.problemReason ?? 'gave-up') : null,
      clips: clips.filter((clip) => clip.takeId === row.id).map(clipDto),
      createdAt: row.createdAt.toISOString(),
    };
  });
}

/** As {@link takeDtos}, by id; ids of another gym are left out. */
export async function takeDtosByIds(
  db: Database | Transaction,
  gymId: string,
  ids: readonly string[],
  now: Date,
): Promise<TakeDto[]> {
  const rows = await findTakes(db, gymId, ids);
  const place = new Map(ids.map((id, i) => [id, i]));
  rows.sort((a, b) => (place.get(a.id) ?? 0) - (place.get(b.id) ?? 0));
  return takeDtos(db, gymId, rows, now);
}
