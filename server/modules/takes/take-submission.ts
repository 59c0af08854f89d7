import type { View } from '../../contract/common';
import type { AssignmentDto } from '../../contract/takes';
import { coachingClock } from '../../calc/hours';
import { answerBy, queueRank } from '../../calc/queue-order';
import type { Database, Transaction } from '../../platform/database';
import { conflict, notFound, refused } from '../../platform/errors';
import { assignmentsByIds } from '../assignments';
import { gymOf } from '../gyms';
import { notify } from '../notices';
import { staffOf } from '../people';
import { clipsOfTakes } from './take-clips-repository';
import { lockedTake, tellTake, waitWhenReady, wordsFor } from './take-flow';
import type { TakeRow } from './take-row';
import { needsConsent } from './take-visibility';
import { setSubmitted } from './takes-repository';

const HOUR = 3_600_000;

/** @throws AppError 404 */
export async function assignmentOf(
  db: Database | Transaction,
  gymId: string,
  id: string,
): Promise<AssignmentDto> {
  const assignment = (await assignmentsByIds(db, gymId, [id])).get(id);
  if (!assignment) throw notFound('That assignment');
  return assignment;
}

const viewWords = (views: readonly View[]) => views.map((view) => `the ${view} clip`).join(' and ');

async function tellPain(trx: Transaction, take: TakeRow, now: Date): Promise<void> {
  if (!take.pain) return;
  const words = await wordsFor(trx, take);
  await notify(
    trx,
    {
      gymId: take.gymId,
      userIds: (await staffOf(trx, take.gymId)).map((coach) => coach.id),
      kind: 'pain',
      title: `${words.member} says that something hurts`,
      body: `${take.pain.where}, ${take.pain.level} of 10. ${words.lift}, take ${take.number}.`,
      link: `/board/${take.id}`,
    },
    now,
  );
}

async function mustBePlayable(trx: Transaction, take: TakeRow): Promise<void> {
  const clips = await clipsOfTakes(trx, take.gymId, [take.id]);
  const missing = take.views.filter((view) => !clips.some((clip) => clip.view === view));
  if (missing.length > 0) {
    throw refused(
      'clips-missing',
      `Before you send the take, add ${viewWords(missing)}.`,
      missing.map((view) => ({ path: view, message: `The ${view} clip is missing.` })),
    );
  }
  const broken = clips.filter((clip) => clip.state === 'unplayable').map((clip) => clip.view);
  if (broken.length > 0) {
    throw refused(
      'clips-unplayable',
      `Before you send the take, send ${viewWords(broken)} again: it cannot be played.`,
      broken.map((view) => ({ path: view, message: `The ${view} clip cannot be played.` })),
    );
  }
}

/**
 * Hands a take in: promises its answer, tells who must know, and lets it wait once every clip is playable. A take that
 * was handed in before is left as it is.
 * @param take its row, held by the transaction
 * @throws AppError 409 when withdrawn; 422 while a clip or a guardian's consent is missing, or a clip cannot be played
 */
export async function submitTake(trx: Transaction, take: TakeRow, now: Date): Promise<void> {
  if (take.state === 'withdrawn') throw conflict('withdrawn', 'You took this take back. Begin a new one.');
  if (take.state !== 'draft' && take.state !== 'unplayable') return;
  if (await needsConsent(trx, take, now)) {
    throw refused(
      'guardian-consent',
      'You are under 18, so a parent or guardian must agree before your clips can be seen. Ask your coach to record it, then send the take.',
    );
  }
  await mustBePlayable(trx, take);
  const gym = await gymOf(trx, take.gymId);
  const assignment = await assignmentOf(trx, take.gymId, take.assignmentId);
  const promiseEnd = coachingClock(gym.coachingHours, gym.timeZone).add(now, gym.promiseHours * HOUR);
  await setSubmitted(trx, take.gymId, take.id, {
    answerBy: answerBy(take.neededBy, promiseEnd),
    promiseHours: gym.promiseHours,
    atStake: assignment.reps === null ? null : assignment.reps * (assignment.rounds ?? 1),
    queueRank: queueRank(take.pain !== null),
    at: now,
  });
  await tellTake(trx, take, 'take.submitted', take.memberId, now);
  await tellPain(trx, take, now);
  await waitWhenReady(trx, await lockedTake(trx, take.gymId, take.id), now);
}
