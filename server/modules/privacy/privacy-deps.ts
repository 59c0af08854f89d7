import type { TakeDetailDto } from '../../contract';
import type { Transaction } from '../../platform/database';
import type { Actor } from '../../platform/http/actor';

export interface PrivacyDeps {
  /** One take with its answer and history, as the actor may see it. */
  detailOf(actor: Actor, takeId: string): Promise<TakeDetailDto>;
  /** Returns to the queue what a person has picked up, in the caller's transaction. */
  putBackAll(trx: Transaction, gymId: string, userId: string, now: Date): Promise<void>;
}
