import type { Pain, TakeState } from '../../contract/takes';
import type { View } from '../../contract/common';

/** A take's state as stored; `picked-up` follows from a lease that still runs. */
export type StoredState = Exclude<TakeState, 'picked-up'>;

/** A take as the database holds it. */
export interface TakeRow {
  readonly id: string;
  readonly gymId: string;
  readonly assignmentId: string;
  readonly liftId: string;
  readonly memberId: string;
  readonly number: number;
  readonly previousTakeId: string | null;
  readonly state: StoredState;
  readonly views: readonly View[];
  readonly neededBy: Date | null;
  readonly load: string | null;
  readonly implement: string | null;
  readonly note: string | null;
  readonly pain: Pain | null;
  readonly atStake: number | null;
  readonly queueRank: number;
  readonly answerBy: Date | null;
  readonly promiseHours: number | null;
  readonly submittedAt: Date | null;
  readonly waitingAt: Date | null;
  readonly answeredAt: Date | null;
  readonly answeredBy: string | null;
  readonly readAt: Date | null;
  readonly pickedUpBy: string | null;
  readonly pickedUpUntil: Date | null;
  readonly problemReason: string | null;
  readonly createdAt: Date;
}

/** Whoever holds the take at `now`, or null: a lease that has run out holds nothing. */
export function holderOf(
  take: Pick<TakeRow, 'state' | 'pickedUpBy' | 'pickedUpUntil'>,
  now: Date,
): { readonly userId: string; readonly until: Date } | null {
  if (take.state !== 'waiting' || !take.pickedUpBy || !take.pickedUpUntil) return null;
  return take.pickedUpUntil > now ? { userId: take.pickedUpBy, until: take.pickedUpUntil } : null;
}

/** The state that people see. */
export const stateOf = (take: TakeRow, now: Date): TakeState =>
  holderOf(take, now) ? 'picked-up' : take.state;
