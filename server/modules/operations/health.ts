import type { HealthDto } from '../../contract';
import type { Mailer } from '../../platform/mail';
import type { Platform } from '../../platform/platform';
import { newestWorkerBeat } from './health-query';

/** A worker that has not been heard of for this long counts as down, ms. */
const WORKER_SILENCE_MS = 30_000;
const PATIENCE_MS = 2_000;

async function answers(check: Promise<unknown>): Promise<'ok' | 'down'> {
  let timer: NodeJS.Timeout | undefined;
  const patience = new Promise<'down'>((resolve) => {
    timer = setTimeout(() => {
      resolve('down');
    }, PATIENCE_MS);
  });
  try {
    return await Promise.race([
      check.then(
        () => 'ok' as const,
        () => 'down' as const,
      ),
      patience,
    ]);
  } finally {
    clearTimeout(timer);
  }
}

/** Asks each part whether it answers. */
export async function checkHealth(platform: Platform, mailer: Mailer, version: string): Promise<HealthDto> {
  const worker = newestWorkerBeat(platform.database).then((at) => {
    if (!at || platform.clock.now().getTime() - at.getTime() > WORKER_SILENCE_MS)
      throw new Error('no worker was heard of lately');
  });
  const parts = await Promise.all([
    answers(platform.database.raw('SELECT 1')),
    answers(platform.store.ping()),
    answers(mailer.ping()),
    answers(worker),
  ]);
  const [database, objectStore, mail, workerPart] = parts;
  return {
    status: parts.every((part) => part === 'ok') ? 'ok' : 'degraded',
    database,
    objectStore,
    mail,
    worker: workerPart,
    version,
  };
}
