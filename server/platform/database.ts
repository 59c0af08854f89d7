import knexFactory, { type Knex } from 'knex';
import { fileURLToPath } from 'node:url';

export type Database = Knex;
export type Transaction = Knex.Transaction;

/** A connection pool to MariaDB: UTC, whole milliseconds, READ COMMITTED (gap locks of the default level make
 *  an idle poll of the job table block other inserts). */
export function openDatabase(url: string, poolSize = 10): Database {
  const { hostname, port, username, password, pathname } = new URL(url);
  return knexFactory({
    client: 'mysql2',
    connection: {
      host: hostname,
      port: Number(port || 3306),
      user: decodeURIComponent(username),
      password: decodeURIComponent(password),
      database: pathname.slice(1),
      timezone: 'Z',
      // knex writes this into CREATE TABLE, so it is a character set; the collation is set below.
      charset: 'utf8mb4',
      supportBigNumbers: true,
      bigNumberStrings: false,
      decimalNumbers: true,
    },
    pool: {
      min: 0,
      max: poolSize,
      afterCreate: (
        connection: { query(sql: string, done: (error: Error | null) => void): void },
        done: (error: Error | null, connection: unknown) => void,
      ) => {
        connection.query(
          "SET NAMES utf8mb4 COLLATE utf8mb4_unicode_ci, time_zone = '+00:00', tx_isolation = 'READ-COMMITTED'",
          (error) => {
            done(error, connection);
          },
        );
      },
    },
    acquireConnectionTimeout: 10_000,
    migrations: {
      directory: fileURLToPath(new URL('../../migrations', import.meta.url)),
      extension: 'ts',
      loadExtensions: ['.ts'],
    },
  });
}

/** Brings the schema up to date. Forward only. */
export async function migrateToLatest(database: Database): Promise<void> {
  await database.migrate.latest();
}

const DEADLOCK = 1213;
const LOCK_WAIT_TIMEOUT = 1205;

/** MariaDB's error number, where the error is the database's. */
export function errnoOf(error: unknown): number | null {
  return error instanceof Error && 'errno' in error && typeof error.errno === 'number' ? error.errno : null;
}

/** Whether an insert failed on a unique key. */
export function isDuplicate(error: unknown): boolean {
  return errnoOf(error) === 1062;
}

/**
 * Runs `work` in one transaction; repeated from the start after a deadlock or a lock time-out, at most five times,
 * so `work` must have no effect outside the database.
 */
export async function inTransaction<T>(
  database: Database,
  work: (trx: Transaction) => Promise<T>,
): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await database.transaction(work);
    } catch (error) {
      const errno = errnoOf(error);
      if ((errno !== DEADLOCK && errno !== LOCK_WAIT_TIMEOUT) || attempt === 5) throw error;
      await new Promise((resolve) => setTimeout(resolve, Math.random() * 20 * 2 ** attempt));
    }
  }
}
