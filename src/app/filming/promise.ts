import type { GymDto } from '@contract';
import { coachingClock } from '@calc/hours';
import { answerBy } from '@calc/queue-order';

const HOUR_MS = 3_600_000;

/**
 * The moment by which the gym promises to answer a take handed in now: the end of its promise in coaching hours, or
 * the moment the member needs it if that is earlier. The API sets the moment that counts when the take is handed in.
 */
export function promisedBy(
  gym: Pick<GymDto, 'promiseHours' | 'coachingHours' | 'timeZone'>,
  neededBy: string | null,
  nowMs: number,
): string {
  const clock = coachingClock(gym.coachingHours, gym.timeZone);
  const promiseEnd = clock.add(new Date(nowMs), gym.promiseHours * HOUR_MS);
  return answerBy(neededBy === null ? null : new Date(neededBy), promiseEnd).toISOString();
}
