import { spawn } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import ffmpeg from 'fluent-ffmpeg';
import { type FfmpegArguments } from './build-args';
import { openJobDirectory } from './job-directory';
import { PROBE_CAPS, type ProcessCaps } from './limits';

/**
 * How a started program is kept in:
 * `bubblewrap` sees /usr and the job's directory and has no network; `unshare` has no network; `limits` has limits.
 * All three run as an unprivileged user, without the environment, under caps on memory, processor and file size.
 */
export type JailMode = 'bubblewrap' | 'unshare' | 'limits';

const JAIL_MODES: readonly JailMode[] = ['bubblewrap', 'unshare', 'limits'];
const JAIL_PATH = fileURLToPath(new URL('./jail.sh', import.meta.url));
/** Enough of what a program says to tell what went wrong; a hostile file can make it say gigabytes. */
const KEPT_STDERR_LINES = 200;
const KEPT_STDOUT_BYTES = 16_000_000;

const DESCRIPTIONS: Readonly<Record<JailMode, string>> = {
  bubblewrap:
    'bubblewrap: no network, own processes, a file system of /usr read-only and the job’s directory, with limits',
  unshare: 'unshare: no network, with limits; the file system is visible to an unprivileged user',
  limits: 'limits only: network and file system are visible to an unprivileged user; install bubblewrap',
};

let detected: Promise<JailMode> | null = null;

/** The strongest mode that works on this machine, found out once by making a picture in each in turn. */
export function detectJail(): Promise<JailMode> {
  detected ??= findWorkingMode();
  return detected;
}

/** One line for the start-up log: which protection is in force. */
export async function describeJail(): Promise<string> {
  return DESCRIPTIONS[await detectJail()];
}

async function findWorkingMode(): Promise<JailMode> {
  const directory = await mkdtemp(join(tmpdir(), 'midfoot-jail-'));
  let said = '';
  try {
    await openJobDirectory(directory);
    for (const jail of JAIL_MODES) {
      // A picture made and written proves libraries, limits, user and directory at once.
      const args = [
        '-v',
        'error',
        '-nostdin',
        '-y',
        '-f',
        'lavfi',
        '-i',
        'color=size=16x16',
        '-frames:v',
        '1',
        'self-test.jpg',
      ];
      const outcome = await runInJail({ program: 'ffmpeg', directory, args, caps: PROBE_CAPS, jail });
      if (outcome.exitCode === 0) return jail;
      said = outcome.stderr.join('\n');
    }
  } finally {
    await rm(directory, { recursive: true, force: true });
  }
  throw new Error(`ffmpeg cannot be started; is it installed? ${said}`);
}

function jailArguments(jail: JailMode, program: 'ffmpeg' | 'ffprobe', caps: ProcessCaps): string[] {
  return [
    `--jail=${jail}`,
    `--program=${program}`,
    `--memory-bytes=${caps.memoryBytes}`,
    `--cpu-seconds=${caps.cpuSeconds}`,
    `--file-bytes=${caps.fileBytes}`,
    '--',
  ];
}

/** Ends a jailed program and everything it started. It heads its own process group as soon as the jail has begun. */
function killGroup(pid: number): void {
  for (const target of [-pid, pid]) {
    try {
      process.kill(target, 'SIGKILL');
    } catch (error) {
      // No such process: it has ended, or (for the group) the jail has not begun yet and `pid` alone is enough.
      if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
    }
  }
}

/** How a program ended. `exitCode` above 128 means killed by the signal `exitCode - 128`. */
export interface RunOutcome {
  exitCode: number;
  stdout: string;
  /** The last lines it said. */
  stderr: string[];
}

interface JailedRun {
  program: 'ffmpeg' | 'ffprobe';
  directory: string;
  args: readonly string[];
  caps: ProcessCaps;
  signal?: AbortSignal;
  jail: JailMode;
}

function runInJail({ program, directory, args, caps, signal, jail }: JailedRun): Promise<RunOutcome> {
  return new Promise((resolve, reject) => {
    signal?.throwIfAborted();
    const child = spawn(JAIL_PATH, [...jailArguments(jail, program, caps), ...args], {
      cwd: directory,
      env: { PATH: '/usr/bin:/bin' },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    const stdout: Buffer[] = [];
    let stdoutBytes = 0;
    const stderr = new LineTail();
    const stop = () => {
      if (child.pid) killGroup(child.pid);
    };
    let timedOut = false;
    const timer = setTimeout(() => {
      timedOut = true;
      stop();
    }, caps.wallMs);
    signal?.addEventListener('abort', stop, { once: true });
    child.stdout.on('data', (chunk: Buffer) => {
      stdoutBytes += chunk.length;
      if (stdoutBytes > KEPT_STDOUT_BYTES) stop();
      else stdout.push(chunk);
    });
    child.stderr.setEncoding('utf8').on('data', (chunk: string) => stderr.append(chunk));
    const settle = (done: () => void) => {
      clearTimeout(timer);
      signal?.removeEventListener('abort', stop);
      done();
    };
    child.on('error', (error) => settle(() => reject(error)));
    child.on('close', (code, endSignal) =>
      settle(() => {
        if (signal?.aborted) reject(signal.reason as Error);
        else if (timedOut)
          reject(new Error(`${program} was still running after ${caps.wallMs} ms and was ended`));
        else if (stdoutBytes > KEPT_STDOUT_BYTES)
          reject(new Error(`${program} said more than ${KEPT_STDOUT_BYTES} bytes`));
        else
          resolve({
            exitCode: exitCodeOf(code, endSignal),
            stdout: Buffer.concat(stdout).toString('utf8'),
            stderr: stderr.lines(),
          });
      }),
    );
  });
}

/** A program ended by a signal inside the jail is told as 128 + its number; outside, by the signal's name. */
function exitCodeOf(code: number | null, endSignal: NodeJS.Signals | null): number {
  if (code !== null) return code;
  return endSignal === 'SIGXCPU' ? 128 + 24 : endSignal === 'SIGXFSZ' ? 128 + 25 : 128 + 9;
}

/** Keeps the last lines of a stream of text, however much comes. */
class LineTail {
  #kept: string[] = [];
  #open = '';

  append(chunk: string): void {
    const parts = (this.#open + chunk).split(/\r?\n|\r/);
    this.#open = (parts.pop() ?? '').slice(-2000);
    this.#kept = [...this.#kept, ...parts].slice(-KEPT_STDERR_LINES);
  }

  lines(): string[] {
    return this.#open ? [...this.#kept, this.#open] : this.#kept;
  }
}

/** Runs ffprobe in the jail on files of `directory`. Rejects if it cannot run to its end; a non-zero exit resolves. */
export async function runFfprobe(run: {
  directory: string;
  args: readonly string[];
  caps?: ProcessCaps;
  signal?: AbortSignal;
  jail?: JailMode;
}): Promise<RunOutcome> {
  const jail = run.jail ?? (await detectJail());
  return runInJail({ caps: PROBE_CAPS, ...run, jail, program: 'ffprobe' });
}

/** How a run of ffmpeg ended, with what it counted. */
export interface FfmpegOutcome extends RunOutcome {
  /** Pictures decoded from the input, by ffmpeg's own final count; `null` if it did not get that far. */
  decodedFrames: number | null;
}

/**
 * Runs ffmpeg in the jail on files of `directory`, through fluent-ffmpeg.
 * Only this function knows that library, which its authors have archived. Two of its habits are worked around here:
 * a listener for its own progress event makes it start ffprobe outside the jail, so progress is read from ffmpeg's
 * report instead; and it kills only the process that it started, so the whole group is killed here.
 *
 * @param run.onFrame called with the number of pictures written so far
 * @returns the outcome, also for a non-zero exit; rejects if aborted, out of time, or unable to start
 */
export async function runFfmpeg(run: {
  directory: string;
  command: FfmpegArguments;
  caps: ProcessCaps;
  onFrame?: (frame: number) => void;
  signal?: AbortSignal;
  jail?: JailMode;
}): Promise<FfmpegOutcome> {
  const { directory, command, caps, signal } = run;
  const jail = run.jail ?? (await detectJail());
  signal?.throwIfAborted();

  return new Promise((resolve, reject) => {
    const started = ffmpeg({ cwd: directory, stdoutLines: 1 })
      .setFfmpegPath(JAIL_PATH)
      .setFfprobePath('/bin/false')
      .input(command.source)
      .inputOptions(...jailArguments(jail, 'ffmpeg', caps), ...command.inputOptions)
      .complexFilter(command.filter);
    // The command comes with one output that has no target; each file gets its own.
    for (const { target, options } of command.outputs) started.output(target).outputOptions(...options);

    const stderr = new LineTail();
    let decodedFrames: number | null = null;
    let pid: number | undefined;
    let timedOut = false;
    const stop = () => {
      if (pid) killGroup(pid);
    };
    const timer = setTimeout(() => {
      timedOut = true;
      stop();
    }, caps.wallMs);
    signal?.addEventListener('abort', stop, { once: true });

    const settle = (exitCode: number, failure?: Error) => {
      clearTimeout(timer);
      signal?.removeEventListener('abort', stop);
      if (signal?.aborted) reject(signal.reason as Error);
      else if (timedOut) reject(new Error(`ffmpeg was still running after ${caps.wallMs} ms and was ended`));
      else if (failure) reject(failure);
      else resolve({ exitCode, stdout: '', stderr: stderr.lines(), decodedFrames });
    };

    started
      .on('start', () => {
        pid = (started as unknown as { ffmpegProc?: { pid?: number } }).ffmpegProc?.pid;
        if (signal?.aborted || timedOut) stop();
      })
      .on('stderr', (line: string) => {
        const progress = /^frame=(\d+)$/.exec(line);
        if (progress) run.onFrame?.(Number(progress[1]));
        else if (!/^[a-z_0-9]+=\s*\S*$/.test(line)) stderr.append(`${line}\n`);
        const count = /Input stream #0:\d+ \(video\):.* (\d+) frames decoded/.exec(line);
        if (count) decodedFrames = Number(count[1]);
      })
      .on('end', () => settle(0))
      .on('error', (error: Error) => {
        const code = /ffmpeg exited with code (\d+)/.exec(error.message)?.[1];
        const byCap = /ffmpeg was killed with signal (SIGXCPU|SIGXFSZ)/.exec(error.message)?.[1];
        if (code) settle(Number(code));
        else if (byCap) settle(exitCodeOf(null, byCap as NodeJS.Signals));
        else settle(-1, error);
      })
      .run();
  });
}
