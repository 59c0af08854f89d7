import { execFile } from 'node:child_process';
import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { promisify } from 'node:util';
import type { Knex } from 'knex';
import { afterEach, beforeEach, describe, expect, inject, it } from 'vitest';
import { openDatabase, type Database } from '../../server/platform/database';
import { newId } from '../../server/platform/ids';
import { projectDir } from '../../server/start/project';
import { createEmptyDatabase, type TestDatabase } from '../support/database';
import { serviceEnvironment } from '../support/environment';

const AT = new Date('2026-12-01T10:00:00.000Z');
const BOOKKEEPING = ['knex_migrations', 'knex_migrations_lock'];

const run = promisify(execFile);

/** The migrations' files under their own names, read the way the specs are. */
const source: Knex.MigrationSource<string> = {
  getMigrations: async () => (await readdir(join(projectDir, 'migrations'))).sort(),
  getMigrationName: (file) => file,
  getMigration: (file) =>
    import(`../../migrations/${file.replace(/\.ts$/, '')}.ts`) as Promise<Knex.Migration>,
};

let empty: TestDatabase;
let database: Database;

beforeEach(async () => {
  empty = await createEmptyDatabase(inject('services'));
  database = openDatabase(empty.url, 2);
});
afterEach(async () => {
  await database.destroy();
  await empty.drop();
});

/** Brings the schema up to date with the program that a deployment runs. */
async function migrate(): Promise<void> {
  await run(process.execPath, ['--import', 'tsx', join('server', 'platform', 'migrate.ts')], {
    cwd: projectDir,
    env: serviceEnvironment(inject('services'), empty.url),
  });
}

async function tables(): Promise<string[]> {
  const rows: { name: string }[] = await database('information_schema.tables')
    .where('table_schema', empty.name)
    .orderBy('table_name')
    .select({ name: 'table_name' });
  return rows.map((row) => row.name);
}

/** Every table as the database would make it again. */
async function schema(): Promise<Record<string, string>> {
  const statements: Record<string, string> = {};
  for (const name of await tables()) {
    const [[row]] = await database.raw('SHOW CREATE TABLE ??', [name]);
    statements[name] = String(row['Create Table']).replace(/ AUTO_INCREMENT=\d+/, '');
  }
  return statements;
}

describe('the migrations', () => {
  it('make every table from nothing, take them down and make the same again', async () => {
    expect(await tables()).toEqual([]);
    await migrate();
    const made = await schema();
    expect(Object.keys(made)).toEqual(
      expect.arrayContaining([
        ...['gyms', 'users', 'sessions', 'invitations', 'lifts', 'lift_faults', 'lift_scales'],
        ...['assignments', 'assignment_members', 'takes', 'clips', 'notifications', 'events', 'jobs'],
        ...['idempotency_keys', 'erasures', 'rate_limits', 'event_counter', ...BOOKKEEPING],
      ]),
    );
    expect(await database('event_counter').select('only_row', 'seq')).toHaveLength(1);
    await database.migrate.rollback({ migrationSource: source }, true);
    expect(await tables()).toEqual(BOOKKEEPING);
    await migrate();
    expect(await schema()).toEqual(made);
  });

  it('change nothing in a database that is up to date', async () => {
    await migrate();
    const gymId = newId();
    await database('gyms').insert({
      id: gymId,
      name: 'Ironbirch Barbell',
      time_zone: 'Europe/Stockholm',
      promise_hours: 8,
      coaching_hours: JSON.stringify({ mon: [], tue: [], wed: [], thu: [], fri: [], sat: [], sun: [] }),
      retention_days: 365,
      created_at: AT,
    });
    await database('users').insert({
      id: newId(),
      gym_id: gymId,
      name: 'Idun Falkenberg',
      email: 'idun@norrhaven.example',
      role: 'owner',
      password_hash: 'none',
      created_at: AT,
    });
    const held = async () => ({
      schema: await schema(),
      gyms: await database('gyms'),
      users: await database('users'),
      applied: await database('knex_migrations'),
      counter: await database('event_counter'),
    });
    const before = await held();
    expect(before.users).toHaveLength(1);
    await migrate();
    expect(await held()).toEqual(before);
  });
});
