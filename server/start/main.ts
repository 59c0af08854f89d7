import { spawn } from 'node:child_process';
import { access, mkdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import * as z from 'zod';
import { buildClient } from './build-client';
import { takeLock } from './lock';
import { isPortFree, rememberedPorts } from './ports';
import { dyingWithUs } from './processes';
import { PORT_NAMES, ownPrograms, programEnvironment, servicesOf } from './programs';
import { projectDir } from './project';
import { loadSecrets } from './secrets';
import { SettingError, givenEnvironment, readStartSettings, type StartSettings } from './settings';
import { Supervisor } from './supervise';
import { endSurvivors, rememberProcesses } from './survivors';

/** Something the person who starts can mend; told without a stack. */
class StartError extends Error {}

const say = (line: string) => {
  console.log(line);
};

const stopping = new AbortController();
const stop = () => {
  if (stopping.signal.aborted) return;
  say('\nStopping …');
  stopping.abort();
};
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, stop);

/** Killing npm tells us nothing: without this we would run on unseen and hold the storage against the next start. */
function stopWithNpm(): void {
  if (process.env['npm_lifecycle_event'] !== 'start') return;
  const npm = process.ppid;
  setInterval(() => {
    if (process.ppid !== npm) stop();
  }, 250).unref();
}

/** How long a start that was told to end may take over it, seconds. */
const farewellSeconds = 8;

/** Runs a program of ours to its end, its output before the reader's eyes. */
async function runToEnd(file: string, env: NodeJS.ProcessEnv): Promise<void> {
  const code = await new Promise<number | null>((resolve, reject) => {
    const child = spawn(...dyingWithUs(process.execPath, ['--import', 'tsx', file]), {
      cwd: projectDir,
      env,
      stdio: ['ignore', 'inherit', 'inherit'],
      signal: stopping.signal,
    });
    child.once('error', reject);
    child.once('exit', resolve);
  });
  if (code !== 0) throw new StartError(`${file} ended with ${String(code)}; what is wrong stands above.`);
}

const accountsFile = (settings: StartSettings) => join(settings.storageDir, 'demo-accounts.json');

/** The accounts are the last thing the seed writes, so they stand for a whole demo. */
async function isDemoMade(settings: StartSettings): Promise<boolean> {
  try {
    await access(accountsFile(settings));
    return true;
  } catch {
    return false; // Not there, or cut off before its end; the seed itself finds out which.
  }
}

const Accounts = z.array(
  z.object({ name: z.string(), role: z.string(), email: z.string(), password: z.string() }),
);

async function demoAccounts(settings: StartSettings): Promise<string[]> {
  const accounts = Accounts.parse(JSON.parse(await readFile(accountsFile(settings), 'utf8')));
  return ['owner', 'coach', 'member'].flatMap((role) => {
    const account = accounts.find((one) => one.role === role);
    return account
      ? [`  ${role.padEnd(7)} ${account.email.padEnd(36)} ${account.password}   (${account.name})`]
      : [];
  });
}

async function waitForStop(): Promise<void> {
  if (stopping.signal.aborted) return;
  await new Promise((resolve) => {
    stopping.signal.addEventListener('abort', resolve, { once: true });
  });
}

/** @throws StartError when the api could not listen where the settings say */
async function checkPort({ port, host }: StartSettings): Promise<void> {
  let free: boolean;
  try {
    free = await isPortFree(port, host);
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    throw new StartError(`Nothing can listen here (${why}). Choose another HOST or PORT.`, { cause: error });
  }
  if (free) return;
  throw new StartError(
    `Port ${String(port)} is in use. Stop what listens there, or choose another: PORT=4400 npm start`,
  );
}

async function runInstance(settings: StartSettings): Promise<void> {
  const { storageDir } = settings;
  const inStorage = (name: string) => join(storageDir, name);
  const ended = await endSurvivors(inStorage('processes.json'));
  if (ended.length > 0) say(`An earlier start was cut off; ended what it left: ${ended.join(', ')}.`);
  await checkPort(settings);
  const secrets = await loadSecrets(inStorage('secrets.json'));
  const ports = await rememberedPorts(inStorage('ports.json'), PORT_NAMES);
  await mkdir(inStorage('work'), { recursive: true });
  await buildClient(say, stopping.signal);

  const supervisor: Supervisor = new Supervisor({
    say,
    changed: () => rememberProcesses(inStorage('processes.json'), supervisor.processes()),
  });
  try {
    const services = servicesOf(settings, secrets, ports);
    if (services.length > 0) say(`Starting ${services.map((service) => service.name).join(', ')} …`);
    await Promise.all(services.map((service) => supervisor.keep(() => service.start())));
    const env = programEnvironment(settings, secrets, ports);
    say('Bringing the database up to date …');
    await runToEnd('server/platform/migrate.ts', env);
    if (settings.demo && !(await isDemoMade(settings))) await runToEnd('seeds/demo.ts', env);
    say('Starting the api and the worker …');
    for (const program of ownPrograms(settings, env)) await supervisor.keep(() => program.start());
    await greet(settings);
    await waitForStop();
  } finally {
    await supervisor.stop();
  }
}

async function greet(settings: StartSettings): Promise<void> {
  say(`\nMidfoot is running: ${settings.publicUrl}`);
  if (settings.demo) {
    say('Demo accounts (address, password):');
    for (const line of await demoAccounts(settings)) say(line);
  } else {
    say(`Open a gym: ${settings.publicUrl}/open-a-gym`);
  }
  if (!settings.given['SMTP_URL']) {
    say(`Mails go nowhere but here: ${settings.publicUrl}/mailbox   (as data: /api/dev/mailbox)`);
  }
  say(`Kept in ${settings.storageDir}. Ctrl-C stops everything.`);
}

async function main(): Promise<void> {
  stopWithNpm();
  const settings = readStartSettings(await givenEnvironment(process.env));
  await mkdir(join(settings.storageDir, 'logs'), { recursive: true });
  const lock = await takeLock(join(settings.storageDir, 'start.lock'), farewellSeconds);
  if (!lock) {
    throw new StartError(
      `Midfoot already runs on ${settings.storageDir}. Stop it, or keep a second one apart: PORT=4400 STORAGE_DIR=storage-2 npm start`,
    );
  }
  try {
    await runInstance(settings);
  } finally {
    await lock.release();
  }
}

try {
  await main();
} catch (error) {
  // What is cut off by Ctrl-C fails, and is meant to.
  if (!stopping.signal.aborted) {
    process.exitCode = 1;
    if (error instanceof StartError || error instanceof SettingError) console.error(`\n${error.message}`);
    else console.error('\nThe start failed.', error);
  }
}
