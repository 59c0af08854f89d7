import type { AssignmentDto } from '../../contract';
import type { Database, Transaction } from '../../platform/database';
import { liftsByIds } from '../lifts';
import { names } from '../people';
import * as repository from './assignments-repository';

/** Assignments as the contract tells them, in the given order, with everyone asked; without counts and takes. */
export async function assignmentDtos(
  db: Database | Transaction,
  gymId: string,
  rows: readonly repository.AssignmentRow[],
): Promise<AssignmentDto[]> {
  const some = rows.filter((row) => !row.forAll).map((row) => row.id);
  const [lifts, people, named] = await Promise.all([
    liftsByIds(db, gymId, [...new Set(rows.map((row) => row.liftId))]),
    names(
      db,
      gymId,
      rows.map((row) => row.createdBy),
    ),
    repository.namedMembers(db, gymId, some),
  ]);
  return rows.map((row) => {
    const lift = lifts.get(row.liftId);
    const createdBy = people.get(row.createdBy);
    if (!lift || !createdBy) throw new Error(`assignment ${row.id} has lost its lift or its coach`);
    return {
      id: row.id,
      lift,
      title: row.title,
      note: row.note,
      load: row.load,
      reps: row.reps,
      rounds: row.rounds,
      trainAt: row.trainAt?.toISOString() ?? null,
      untilAnsweredScaleId: row.untilAnsweredScaleId,
      audience: row.forAll ? { all: true as const } : { memberIds: named.get(row.id) ?? [] },
      createdBy,
      createdAt: row.createdAt.toISOString(),
      closedAt: row.closedAt?.toISOString() ?? null,
      counts: null,
      myTakes: [],
    };
  });
}

/** Assignments by id, with everyone asked; for domains that build on them. */
export async function assignmentsByIds(
  db: Database | Transaction,
  gymId: string,
  ids: readonly string[],
): Promise<Map<string, AssignmentDto>> {
  const rows = await repository.findAssignments(db, gymId, ids);
  return new Map((await assignmentDtos(db, gymId, rows)).map((dto) => [dto.id, dto]));
}
