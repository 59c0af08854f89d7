import { describeJail } from '../media';
import { beat, pruneProgressEvents } from '../modules/processing';
import { sweepLapsed } from '../modules/queue';
import { newId } from '../platform/ids';
import type { Mailer } from '../platform/mail';
import type { Platform } from '../platform/platform';
import { JOB_KINDS } from './job-kinds';
import { startJobLoop } from './job-loop';

const SWEEP_MS = 5_000;
const PROGRESS_KEPT_MS = 60 * 60_000;

export interface Worker {
  stop(): Promise<void>;
}

/** Runs jobs, and now and then tidies what processes that died left behind. */
export async function startWorker(platform: Platform, mailer: Mailer): Promise<Worker> {
  const { database, clock, logger, config } = platform;
  const worker = newId();
  const jail = await describeJail();
  logger.info({ worker, jail }, 'working');
  const loop = startJobLoop(platform, mailer, JOB_KINDS, worker, config.workerConcurrency);

  const sweep = async () => {
    try {
      const now = clock.now();
      await beat(database, worker, jail, now);
      await loop.sweep();
      await sweepLapsed(database, now);
      await pruneProgressEvents(database, new Date(now.getTime() - PROGRESS_KEPT_MS));
    } catch (error) {
      logger.warn({ err: error }, 'tidying failed; trying again');
    }
  };
  let sweeping = sweep();
  const timer = setInterval(() => {
    sweeping = sweeping.then(sweep);
  }, SWEEP_MS);

  return {
    async stop() {
      clearInterval(timer);
      await loop.stop();
      await sweeping;
    },
  };
}
