import type { JobPayload, JobType } from '../contract/jobs';
import type { Transaction } from '../platform/database';
import type { Mailer } from '../platform/mail';
import type { Platform } from '../platform/platform';

export interface JobContext {
  readonly platform: Platform;
  readonly mailer: Mailer;
  readonly attempt: number;
  readonly jobId: number;
  /** Aborted when the lease is lost or the worker is told to stop. */
  readonly signal: AbortSignal;
}

/** What a job's work leaves to be written in the transaction that completes the job; null when nothing is. */
export type Conclusion = ((trx: Transaction) => Promise<void>) | null;

/** Does one job's work. No transaction may be open while it runs. */
export type Handler<T extends JobType> = (payload: JobPayload<T>, context: JobContext) => Promise<Conclusion>;

export interface DeadEndContext {
  readonly trx: Transaction;
  readonly platform: Platform;
  readonly now: Date;
  readonly jobId: number;
  /** The last attempt. */
  readonly attempt: number;
}

/** Written, in one transaction, when a job has failed for the last time. */
export type DeadEnd<T extends JobType> = (payload: JobPayload<T>, context: DeadEndContext) => Promise<void>;

export interface JobKind<T extends JobType> {
  readonly run: Handler<T>;
  readonly onDead?: DeadEnd<T>;
}

export type JobKinds = { readonly [T in JobType]: JobKind<T> };
