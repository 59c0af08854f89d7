import { type ChildProcess, spawn } from 'node:child_process';
import { closeSync, constants, mkdirSync, openSync } from 'node:fs';
import { access, readFile } from 'node:fs/promises';
import { delimiter, dirname, join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

/** What to start. Its output goes to the end of `logFile`. */
export interface ProcessCommand {
  name: string;
  command: string;
  args: readonly string[];
  /** The whole environment of the program; nothing is inherited beside it. */
  env: NodeJS.ProcessEnv;
  cwd: string;
  logFile: string;
  /** Operating-system account to run as; only root may ask for another. */
  user?: string;
}

/** How a program ended. */
export interface ProcessEnd {
  code: number | null;
  signal: NodeJS.Signals | null;
}

/** A program that was started; it leads a process group of its own. */
export interface RunningProcess {
  name: string;
  pid: number;
  logFile: string;
  /** Resolves when the program has ended and what was left of its group has been killed. */
  ended: Promise<ProcessEnd>;
  /** True from the start until the program has ended. */
  isAlive(): boolean;
  /** Asks the program to end (SIGTERM), and kills its whole group when it is still there after `graceMs`. */
  stop(graceMs?: number): Promise<void>;
}

const running = new Set<ChildProcess>();
let exitHookInstalled = false;

/**
 * Starts a program in a process group of its own, so that Ctrl-C on the terminal reaches only us and we choose
 * the order of stopping. The kernel sends it SIGTERM when we die, however we die (`setpriv --pdeathsig`).
 */
export function startProcess(command: ProcessCommand): Promise<RunningProcess> {
  installExitHook();
  mkdirSync(dirname(command.logFile), { recursive: true });
  const log = openSync(command.logFile, 'a');
  const child = spawn('setpriv', [...setprivOptions(command.user), '--', command.command, ...command.args], {
    cwd: command.cwd,
    env: command.env,
    stdio: ['ignore', log, log],
    detached: true,
  });
  closeSync(log);
  running.add(child);
  const ended = new Promise<ProcessEnd>((resolve) => {
    child.once('exit', (code, signal) => {
      running.delete(child);
      killGroup(child.pid);
      resolve({ code, signal });
    });
  });
  return new Promise((resolve, reject) => {
    child.once('error', (error) => {
      running.delete(child);
      reject(new Error(`${command.name} could not be started: ${error.message}`, { cause: error }));
    });
    child.once('spawn', () => {
      const pid = child.pid;
      if (pid === undefined) return;
      resolve({
        name: command.name,
        pid,
        logFile: command.logFile,
        ended,
        isAlive: () => running.has(child),
        stop: (graceMs = 10_000) => stop(child, ended, graceMs),
      });
    });
  });
}

/**
 * Program and arguments of a helper that runs to its end beside us. The kernel kills it when we die, however we die:
 * what a killed start left at work would get in the way of the next.
 */
export function dyingWithUs(command: string, args: readonly string[]): [string, string[]] {
  return ['setpriv', ['--pdeathsig', 'KILL', '--', command, ...args]];
}

/**
 * Waits until `isReady` says yes. Fails when the program ends first or `timeoutMs` pass; the message carries the
 * last lines of its log.
 */
export async function waitUntilReady(
  started: RunningProcess,
  isReady: () => Promise<boolean>,
  timeoutMs: number,
): Promise<void> {
  const deadline = Date.now() + timeoutMs;
  for (;;) {
    if (!started.isAlive()) {
      const { code, signal } = await started.ended;
      throw new Error(
        `${started.name} ended at once (${signal ?? `exit ${String(code)}`}).${await logTail(started.logFile)}`,
      );
    }
    if (await isReady()) return;
    if (Date.now() > deadline) {
      throw new Error(
        `${started.name} was not ready after ${String(timeoutMs / 1000)} s.${await logTail(started.logFile)}`,
      );
    }
    await sleep(25);
  }
}

/** True when an HTTP server answers `url` at all, whatever the status. */
export async function answersHttp(url: string): Promise<boolean> {
  try {
    const response = await fetch(url, { signal: AbortSignal.timeout(2_000) });
    await response.body?.cancel();
    return true;
  } catch {
    return false; // Refused or timed out: not ready yet, which is all the caller asks.
  }
}

/** The last lines of a log, ready to follow a message; empty when there is no log. */
export async function logTail(logFile: string, lines = 20): Promise<string> {
  try {
    const text = (await readFile(logFile, 'utf8')).trimEnd();
    if (text === '') return '';
    return `\n  From ${logFile}:\n${text
      .split('\n')
      .slice(-lines)
      .map((line) => `    ${line}`)
      .join('\n')}`;
  } catch {
    return ''; // The log only decorates a message about something worse.
  }
}

/** The full path of a program, also looked for in the folders that only root has on its PATH. */
export async function findProgram(name: string): Promise<string> {
  const folders = [...(process.env['PATH'] ?? '').split(delimiter), '/usr/local/sbin', '/usr/sbin', '/sbin'];
  for (const folder of folders) {
    if (folder === '') continue;
    const candidate = join(folder, name);
    try {
      await access(candidate, constants.X_OK);
      return candidate;
    } catch {
      continue; // Not in this folder.
    }
  }
  throw new Error(
    `The program ${name} is missing. Run "bash server/start/setup.sh" to install what is needed.`,
  );
}

function setprivOptions(user: string | undefined): string[] {
  const options = ['--pdeathsig', 'TERM'];
  if (user !== undefined) options.push(`--reuid=${user}`, `--regid=${user}`, '--init-groups');
  return options;
}

async function stop(child: ChildProcess, ended: Promise<ProcessEnd>, graceMs: number): Promise<void> {
  if (!running.has(child)) return;
  child.kill('SIGTERM');
  const timer = setTimeout(() => {
    killGroup(child.pid);
  }, graceMs);
  await ended;
  clearTimeout(timer);
}

/** Kills what is left of a process group; a group that is gone is what we want. */
function killGroup(pid: number | undefined): void {
  if (pid === undefined) return;
  try {
    process.kill(-pid, 'SIGKILL');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
  }
}

function installExitHook(): void {
  if (exitHookInstalled) return;
  exitHookInstalled = true;
  process.once('exit', () => {
    for (const child of running) killGroup(child.pid);
  });
}
