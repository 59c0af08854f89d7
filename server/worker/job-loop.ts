import { setMaxListeners } from 'node:events';
import { JOB_PAYLOADS, type JobType } from '../contract/jobs';
import { inTransaction } from '../platform/database';
import {
  LEASE_MS,
  claimJob,
  completeJob,
  failJob,
  handBackJob,
  lapsedJobs,
  renewJob,
  type ClaimedJob,
} from '../platform/jobs';
import type { Mailer } from '../platform/mail';
import type { Platform } from '../platform/platform';
import type { JobKind, JobKinds } from './handler';

/** An empty poll costs a tenth of a millisecond, so an idle worker starts a new job well within 100 ms. */
const POLL_MS = 50;
const HEARTBEAT_MS = LEASE_MS / 4;

class LeaseLost extends Error {
  constructor() {
    super('the lease of this job was lost; another worker has it');
    this.name = 'LeaseLost';
  }
}

const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

export interface JobLoop {
  /** Stops claiming, aborts what runs and hands it back. */
  stop(): Promise<void>;
  /** Fails jobs whose worker has gone; called now and then by any worker. */
  sweep(): Promise<void>;
}

/** Runs jobs as they come due, at most `concurrency` at once. */
export function startJobLoop(
  platform: Platform,
  mailer: Mailer,
  kinds: JobKinds,
  worker: string,
  concurrency: number,
): JobLoop {
  const { database, clock, logger } = platform;
  const stopping = new AbortController();

  const bury = async <T extends JobType>(
    kind: JobKind<T>,
    job: ClaimedJob,
    error: unknown,
    holder: string,
  ) => {
    const outcome = await inTransaction(database, async (trx) => {
      const result = await failJob(trx, holder, job, error, clock.now());
      const payload = JOB_PAYLOADS[job.type].safeParse(job.payload);
      if (result === 'dead' && kind.onDead && payload.success)
        await kind.onDead(payload.data as Parameters<typeof kind.onDead>[0], {
          trx,
          platform,
          now: clock.now(),
          jobId: job.id,
          attempt: job.attempt,
        });
      return result;
    });
    const level = outcome === 'dead' ? 'error' : 'warn';
    logger[level](
      { err: error, jobId: job.id, type: job.type, attempt: job.attempt, outcome },
      'a job failed',
    );
  };

  const run = async <T extends JobType>(kind: JobKind<T>, job: ClaimedJob) => {
    const abort = new AbortController();
    const signal = AbortSignal.any([abort.signal, stopping.signal]);
    // A job hands its signal to everything it starts, a dozen uploads at once among them.
    setMaxListeners(0, signal);
    const heartbeat = setInterval(() => {
      renewJob(database, worker, job, clock.now()).then(
        (kept) => {
          if (!kept) abort.abort(new LeaseLost());
        },
        (error: unknown) => {
          logger.warn({ err: error, jobId: job.id }, 'a lease could not be renewed; trying again');
        },
      );
    }, HEARTBEAT_MS);
    try {
      const payload = JOB_PAYLOADS[job.type].parse(job.payload) as Parameters<typeof kind.run>[0];
      const conclude = await kind.run(payload, {
        platform,
        mailer,
        attempt: job.attempt,
        jobId: job.id,
        signal,
      });
      await inTransaction(database, async (trx) => {
        if (!(await completeJob(trx, worker, job, clock.now()))) throw new LeaseLost();
        await conclude?.(trx);
      });
    } catch (error) {
      if (error instanceof LeaseLost || abort.signal.aborted) {
        logger.warn(
          { jobId: job.id, type: job.type },
          'a lease was lost; the work is left to who has it now',
        );
      } else if (stopping.signal.aborted) {
        await handBackJob(database, worker, job, clock.now());
      } else {
        await bury(kind, job, error, worker);
      }
    } finally {
      clearInterval(heartbeat);
    }
  };

  const work = async () => {
    while (!stopping.signal.aborted) {
      try {
        const job = await claimJob(database, worker, clock.now());
        if (job) await run(kinds[job.type], job);
        else await pause(POLL_MS);
      } catch (error) {
        logger.warn({ err: error }, 'the job table could not be read; trying again');
        await pause(1000);
      }
    }
  };
  const working = Array.from({ length: concurrency }, work);

  return {
    async sweep() {
      for (const job of await lapsedJobs(database, clock.now())) {
        await bury(
          kinds[job.type],
          job,
          new Error('its worker was not heard of within the lease'),
          job.worker,
        );
      }
    },
    async stop() {
      stopping.abort(new Error('the worker was told to stop'));
      await Promise.all(working);
    },
  };
}
