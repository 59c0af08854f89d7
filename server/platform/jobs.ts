import { JOB_PAYLOADS, type JobPayload, type JobType } from '../contract/jobs';
import { isDuplicate, type Database, type Transaction } from './database';

/** How long a claimed job is its worker's without a heartbeat, ms. */
export const LEASE_MS = 60_000;
export const MAX_ATTEMPTS = 5;
const BACKOFF_BASE_MS = 5_000;
const BACKOFF_CAP_MS = 15 * 60_000;

export interface ClaimedJob {
  readonly id: number;
  readonly type: JobType;
  readonly payload: unknown;
  /** Counted at the claim, so a job that kills its worker is counted too. */
  readonly attempt: number;
  readonly maxAttempts: number;
}

export interface EnqueueOptions {
  readonly runAt?: Date;
  readonly maxAttempts?: number;
  /** At most one job with this key ever exists; a second is not added. */
  readonly dedupeKey?: string;
}

/** Adds a job in the caller's transaction. Returns false when its dedupe key is taken. */
export async function enqueueJob<T extends JobType>(
  trx: Transaction | Database,
  type: T,
  payload: JobPayload<T>,
  now: Date,
  options: EnqueueOptions = {},
): Promise<boolean> {
  try {
    await trx('jobs').insert({
      type,
      payload: JSON.stringify(JOB_PAYLOADS[type].parse(payload)),
      state: 'queued',
      run_at: options.runAt ?? now,
      max_attempts: options.maxAttempts ?? MAX_ATTEMPTS,
      dedupe_key: options.dedupeKey ?? null,
      created_at: now,
    });
    return true;
  } catch (error) {
    if (options.dedupeKey && isDuplicate(error)) return false;
    throw error;
  }
}

interface JobRow {
  id: number;
  type: JobType;
  payload: unknown;
  attempts: number;
  max_attempts: number;
}

/**
 * Claims the next due job in one short transaction. The index (state, run_at, id) matches WHERE and ORDER BY
 * exactly: with a sort, SKIP LOCKED would lock every candidate and starve the other workers.
 */
export async function claimJob(database: Database, worker: string, now: Date): Promise<ClaimedJob | null> {
  return database.transaction(async (trx) => {
    const row: JobRow | undefined = await trx('jobs')
      .select('id', 'type', 'payload', 'attempts', 'max_attempts')
      .where('state', 'queued')
      .andWhere('run_at', '<=', now)
      .orderBy('run_at')
      .orderBy('id')
      .first()
      .forUpdate()
      .skipLocked();
    if (!row) return null;
    await trx('jobs')
      .where({ id: row.id })
      .update({
        state: 'running',
        worker,
        attempts: row.attempts + 1,
        lease_until: new Date(now.getTime() + LEASE_MS),
      });
    return {
      id: row.id,
      type: row.type,
      payload: row.payload,
      attempt: row.attempts + 1,
      maxAttempts: row.max_attempts,
    };
  });
}

/** The fence: only the worker that holds this attempt may touch the job. */
const held = (db: Database | Transaction, worker: string, job: ClaimedJob) =>
  db('jobs').where({ id: job.id, worker, attempts: job.attempt, state: 'running' });

/** Renews the lease; false when it was lost and the work must stop. */
export async function renewJob(
  database: Database,
  worker: string,
  job: ClaimedJob,
  now: Date,
): Promise<boolean> {
  return (
    (await held(database, worker, job).update({ lease_until: new Date(now.getTime() + LEASE_MS) })) === 1
  );
}

/** Completes in the caller's transaction; false when the lease was lost, and then the caller must roll back. */
export async function completeJob(
  trx: Transaction | Database,
  worker: string,
  job: ClaimedJob,
  now: Date,
): Promise<boolean> {
  return (
    (await held(trx, worker, job).update({
      state: 'done',
      finished_at: now,
      lease_until: null,
      last_error: null,
    })) === 1
  );
}

/** Full-jitter exponential backoff before attempt `attempt + 1`, ms. */
export function backoffMs(attempt: number, random: number): number {
  return Math.round(random * Math.min(BACKOFF_CAP_MS, BACKOFF_BASE_MS * 2 ** (attempt - 1)));
}

/** Puts a failed job back with backoff, or to its dead end after the last attempt. Returns 'lost' without the lease. */
export async function failJob(
  trx: Transaction | Database,
  worker: string,
  job: ClaimedJob,
  error: unknown,
  now: Date,
): Promise<'again' | 'dead' | 'lost'> {
  const dead = job.attempt >= job.maxAttempts;
  const last_error = (error instanceof Error ? error.message : String(error)).slice(0, 1000);
  const changed = await held(trx, worker, job).update(
    dead
      ? { state: 'dead', finished_at: now, lease_until: null, last_error }
      : {
          state: 'queued',
          worker: null,
          lease_until: null,
          run_at: new Date(now.getTime() + backoffMs(job.attempt, Math.random())),
          last_error,
        },
  );
  if (changed !== 1) return 'lost';
  return dead ? 'dead' : 'again';
}

/** Hands a job back at once, as if it had not been claimed (a worker that is told to stop). */
export async function handBackJob(
  database: Database,
  worker: string,
  job: ClaimedJob,
  now: Date,
): Promise<void> {
  await held(database, worker, job).update({
    state: 'queued',
    worker: null,
    lease_until: null,
    run_at: now,
    attempts: job.attempt - 1,
  });
}

/** Finds running jobs whose lease lapsed, oldest first. */
export async function lapsedJobs(
  database: Database,
  now: Date,
): Promise<(ClaimedJob & { worker: string })[]> {
  const rows: (JobRow & { worker: string })[] = await database('jobs')
    .select('id', 'type', 'payload', 'attempts', 'max_attempts', 'worker')
    .where('state', 'running')
    .andWhere('lease_until', '<', now)
    .orderBy('lease_until')
    .limit(20);
  return rows.map((row) => ({
    id: row.id,
    type: row.type,
    payload: row.payload,
    attempt: row.attempts,
    maxAttempts: row.max_attempts,
    worker: row.worker,
  }));
}
