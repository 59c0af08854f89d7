import { RateLimiterMySQL, RateLimiterRes } from 'rate-limiter-flexible';
import type { Database } from '../database';
import { AppError } from '../errors';

export interface RateLimit {
  /** @throws AppError 429, with how long to wait, when `key` has used up its points */
  consume(key: string): Promise<void>;
  /** Forgets `key`, for instance after a successful sign-in. */
  reset(key: string): Promise<void>;
}

/** A limit kept in the database, so that it holds over all api processes. Slows down; never locks an account. */
export function createRateLimit(
  database: Database,
  name: string,
  points: number,
  seconds: number,
): RateLimit {
  const limiter = new RateLimiterMySQL({
    storeClient: database,
    storeType: 'knex',
    dbName: String(database.client.config.connection.database),
    tableName: 'rate_limits',
    tableCreated: true,
    keyPrefix: name,
    points,
    duration: seconds,
    clearExpiredByTimeout: false,
  });
  return {
    async consume(key) {
      try {
        await limiter.consume(key.slice(0, 200));
      } catch (outcome) {
        if (!(outcome instanceof RateLimiterRes)) throw outcome;
        const wait = Math.max(1, Math.ceil(outcome.msBeforeNext / 1000));
        throw new AppError(429, 'too-many', `Too many tries. Wait ${wait} seconds and try again.`, {
          headers: { 'Retry-After': String(wait) },
        });
      }
    },
    async reset(key) {
      await limiter.delete(key.slice(0, 200));
    },
  };
}
