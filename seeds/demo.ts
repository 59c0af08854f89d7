import { mkdtemp, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { LiftDto } from '../server/contract';
import { addGym, gymOf } from '../server/modules/gyms';
import { insertUser } from '../server/modules/people';
import { createSessions, deleteSessions } from '../server/modules/sessions';
import { readConfig } from '../server/platform/config';
import { inTransaction } from '../server/platform/database';
import { newId } from '../server/platform/ids';
import { openMailer } from '../server/platform/mail';
import { openPlatform } from '../server/platform/open-platform';
import type { Platform } from '../server/platform/platform';
import { calendarOf } from './demo/calendar';
import { drawAll, writeBrokenClip } from './demo/clips';
import { openDesk, type DeskPerson } from './demo/desk';
import { liveHistory, PAIRS, type People } from './demo/history';
import { LIBRARY } from './demo/lifts';
import { GYM_NAME, PEOPLE, TIME_ZONE, madePassword } from './demo/people';
import { demoGymId, undoDemo } from './demo/undo';

/**
 * Makes the demo's gym by living through its last days on the product itself. Does nothing when the gym is there;
 * takes away and begins anew what a cut-off start left. Run after the migrations and before the api and the worker.
 */

const DAY_MS = 86_400_000;

async function isComplete(file: string): Promise<boolean> {
  try {
    return (await readFile(file, 'utf8')).length > 0;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return false;
    throw error;
  }
}

/** The gym and its people, with a session each for what they do here. */
async function openGym(platform: Platform, start: Date, passwords: ReadonlyMap<string, string>) {
  const hashes = new Map<string, string>();
  for (const [key, password] of passwords) hashes.set(key, await platform.passwords.hash(password));
  const sessions = createSessions({ ...platform, clock: { now: () => start } });
  return inTransaction(platform.database, async (trx) => {
    const gym = await addGym(trx, { name: GYM_NAME, timeZone: TIME_ZONE }, start);
    const people = new Map<string, DeskPerson>();
    for (const { key, name, role, email, kit } of PEOPLE) {
      const id = newId();
      await insertUser(
        trx,
        { id, gymId: gym.id, name, email, role, passwordHash: hashes.get(key) ?? '', bornOn: null },
        start,
      );
      await trx('users').where({ gym_id: gym.id, id }).update({ kit });
      await sessions.start(trx, { gymId: gym.id, id }, 'Demo');
      const session: { id: string } | undefined = await trx('sessions')
        .where({ gym_id: gym.id, user_id: id })
        .first('id');
      if (!session) throw new Error('a session that was just begun is not there');
      people.set(key, { gymId: gym.id, userId: id, sessionId: session.id });
    }
    return { gym, people };
  });
}

function progress(what: string): (done: number, of: number) => void {
  return (done, of) => {
    if (process.stdout.isTTY)
      process.stdout.write(`\r${what} ${String(done)} of ${String(of)}${done === of ? '\n' : ''}`);
    else if (done === of) console.log(`${what} ${String(of)}`);
  };
}

async function makeDemo(platform: Platform, accountsFile: string): Promise<void> {
  const now = new Date();
  const start = new Date(now.getTime() - 12 * DAY_MS);
  const passwords = new Map(PEOPLE.map((one) => [one.key as string, madePassword()]));
  const dir = await mkdtemp(join(tmpdir(), 'midfoot-demo-'));
  const mailer = openMailer(platform.config.smtpUrl, platform.config.mailFrom);
  try {
    await drawAll(dir, Object.values(PAIRS), progress('  drawing clips:'));
    const broken = join(dir, 'broken.mp4');
    await writeBrokenClip(broken);
    const { gym, people } = await openGym(platform, start, passwords);
    const desk = await openDesk(platform, mailer, start);
    try {
      const person = (key: string): DeskPerson => {
        const found = people.get(key);
        if (!found) throw new Error(`nobody is called ${key}`);
        return found;
      };
      const lifts = new Map<string, LiftDto>();
      for (const { lift } of LIBRARY) {
        lifts.set(lift.name, await desk.call<LiftDto>(person('maren'), 'POST', '/api/lifts', lift));
      }
      await desk.work(true);
      const actors: People = {
        maren: person('maren'),
        petru: person('petru'),
        tove: person('tove'),
        ilmari: person('ilmari'),
        signe: person('signe'),
        joaquin: person('joaquin'),
        edda: person('edda'),
      };
      await liveHistory(
        desk,
        actors,
        lifts,
        calendarOf(await gymOf(platform.database, gym.id), now),
        { dir, broken },
        progress('  living through the last days:'),
      );
    } finally {
      await desk.close();
    }
    await inTransaction(platform.database, async (trx) => {
      for (const { userId, gymId } of people.values()) await deleteSessions(trx, gymId, userId);
    });
  } finally {
    mailer.close();
    await rm(dir, { recursive: true, force: true });
  }
  const accounts = PEOPLE.map(({ key, name, role, email }) => ({
    name,
    role,
    email,
    password: passwords.get(key),
  }));
  const unfinished = `${accountsFile}.new`;
  await writeFile(unfinished, `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600 });
  await rename(unfinished, accountsFile);
}

const config = readConfig({ LOG_LEVEL: 'warn', ...process.env });
const { platform, close } = openPlatform({ ...config, workerConcurrency: 2 }, 'demo');
try {
  const [owner] = PEOPLE;
  const accountsFile = join(config.storageDir, 'demo-accounts.json');
  const left = await demoGymId(platform, owner.email);
  if (!left || !(await isComplete(accountsFile))) {
    if (left) await undoDemo(platform, left);
    console.log('Making the demo (a few minutes, once) …');
    await makeDemo(platform, accountsFile);
  }
} finally {
  await close();
}
