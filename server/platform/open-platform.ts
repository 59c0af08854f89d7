import { systemClock } from './clock';
import type { Config } from './config';
import { openDatabase } from './database';
import { startEventStream } from './events';
import { createLogger } from './logging';
import { openObjectStore } from './object-store';
import { createPasswordHasher } from './passwords';
import type { Platform } from './platform';

export interface OpenPlatform {
  readonly platform: Platform;
  close(): Promise<void>;
}

/** Opens everything a program needs: the database pool, the store, the event stream. */
export function openPlatform(config: Config, program: string): OpenPlatform {
  const logger = createLogger(config.logLevel, program);
  const database = openDatabase(config.databaseUrl);
  const events = startEventStream(database, logger);
  return {
    platform: {
      config,
      database,
      events,
      logger,
      store: openObjectStore(config.store),
      clock: systemClock,
      passwords: createPasswordHasher(config.argon2.memoryKiB, config.argon2.passes),
    },
    async close() {
      await events.stop();
      await database.destroy();
    },
  };
}
