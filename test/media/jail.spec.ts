import { execFile } from 'node:child_process';
import { chmod, mkdtemp, readdir, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { describeJail } from '../../server/media';
import { type FfmpegArguments } from '../../server/media/build-args';
import { makeJobDirectory } from '../../server/media/job-directory';
import { PROBE_CAPS, renditionCaps } from '../../server/media/limits';
import { detectJail, type JailMode, runFfmpeg, runFfprobe } from '../../server/media/run';
import { type Canary, setUpCanary } from './support/canary';
import { makeClip } from './support/clip-maker';
import { type Bench, openBench } from './support/harness';

let bench: Bench;
let canary: Canary;
let clip: string;
beforeAll(async () => {
  bench = await openBench();
  canary = await setUpCanary(bench.directory);
  clip = bench.file('clip.mp4');
  await makeClip(clip, { frames: 60 });
});
afterAll(async () => {
  await canary.close();
  await bench.tidy();
});

const job = async () => makeJobDirectory(await mkdtemp(join(bench.directory, 'work-')), clip);

/** A command that goes on until it is stopped, and writes a small file as soon as it has begun. */
const endless = (label: string): FfmpegArguments => ({
  inputOptions: [
    '-nostdin',
    '-v',
    'error',
    '-stats_period',
    '0.1',
    '-progress',
    'pipe:2',
    '-re',
    '-stream_loop',
    '-1',
  ],
  source: 'file:source',
  filter: `[0:v]drawbox=t=1,metadata=add:key=label:value=${label}[v]`,
  outputs: [{ target: 'begun.mkv', options: ['-map', '[v]', '-c:v', 'mpeg4'] }],
});

async function running(label: string): Promise<string[]> {
  const { stdout } = await promisify(execFile)('ps', ['-eo', 'pid,user:20,ni,args', '-ww']);
  return stdout.split('\n').filter((line) => line.includes(`value=${label}`));
}

async function until(check: () => Promise<boolean>): Promise<void> {
  while (!(await check())) await new Promise((resolve) => setTimeout(resolve, 50));
}

const MODES: JailMode[] = ['bubblewrap', 'unshare', 'limits'];

describe('the jail', () => {
  it('says which protection is in force', async () => {
    expect(await describeJail()).toMatch(new RegExp(`^${await detectJail()}`));
  });

  it.each(MODES)(
    '%s: runs on the job’s directory, as an unprivileged user, and leaves files that we can read',
    async (jail) => {
      const directory = await job();
      const frames: number[] = [];
      const command = {
        ...endless('short'),
        inputOptions: ['-nostdin', '-v', 'verbose', '-nostats', '-progress', 'pipe:2'],
      };
      const outcome = await runFfmpeg({
        directory,
        command,
        caps: PROBE_CAPS,
        jail,
        onFrame: (frame) => frames.push(frame),
      });
      expect(outcome).toMatchObject({ exitCode: 0, decodedFrames: 60 });
      expect(frames.at(-1)).toBe(60);
      const made = await stat(join(directory, 'begun.mkv'));
      expect(made.size).toBeGreaterThan(1000);
      expect(made.uid).toBe(process.getuid?.() === 0 ? 65534 : process.getuid?.());
    },
  );

  it.each(MODES.filter((mode) => mode !== 'limits'))(
    '%s: reaches no port, even when asked to',
    async (jail) => {
      const directory = await job();
      const before = await canary.touches();
      const { exitCode } = await runFfprobe({
        directory,
        jail,
        args: ['-v', 'error', `tcp://127.0.0.1:${canary.port}`],
      });
      expect(exitCode).not.toBe(0);
      expect((await canary.touches()).connections).toBe(before.connections);
    },
  );

  it('limits: would reach the port, so that the test above means something', async () => {
    const directory = await job();
    await runFfprobe({ directory, jail: 'limits', args: ['-v', 'error', `tcp://127.0.0.1:${canary.port}`] });
    expect((await canary.touches()).connections).toBeGreaterThan(0);
  });

  it('bubblewrap: sees no file but the job’s', async () => {
    const directory = await job();
    const readable = bench.file('readable.mp4');
    await makeClip(readable, { frames: 12 });
    await chmod(readable, 0o644);
    const { exitCode, stderr } = await runFfprobe({
      directory,
      jail: 'bubblewrap',
      args: ['-v', 'error', `file:${readable}`],
    });
    expect(exitCode).not.toBe(0);
    expect(stderr.join()).toContain('No such file or directory');
  });

  it('passes nothing of our environment on', async () => {
    process.env['MEDIA_TEST_SECRET'] = 'hush';
    try {
      const directory = await job();
      const controller = new AbortController();
      const run = runFfmpeg({
        directory,
        command: endless('environment'),
        caps: PROBE_CAPS,
        signal: controller.signal,
      });
      const ended = expect(run).rejects.toThrow('enough');
      await until(async () => (await readdir(directory)).includes('begun.mkv'));
      const [line] = (await running('environment')).filter((found) =>
        /^\s*\d+ \S+\s+\S+ ffmpeg /.test(found),
      );
      const pid = /^\s*(\d+)/.exec(line ?? '')?.[1];
      const { stdout } = await promisify(execFile)('cat', [`/proc/${pid}/environ`]);
      expect(stdout).toContain('PATH=/usr/bin:/bin');
      expect(stdout).not.toContain('hush');
      controller.abort(new Error('enough'));
      await ended;
    } finally {
      delete process.env['MEDIA_TEST_SECRET'];
    }
  });

  it.each(MODES)('%s: ends the whole group when told to', async (jail) => {
    const directory = await job();
    const controller = new AbortController();
    const label = `abort-${jail}`;
    const run = runFfmpeg({
      directory,
      command: endless(label),
      caps: PROBE_CAPS,
      jail,
      signal: controller.signal,
    });
    const ended = expect(run).rejects.toThrow('told to stop');
    await until(async () => (await readdir(directory)).includes('begun.mkv'));
    expect(await running(label)).not.toEqual([]);
    controller.abort(new Error('told to stop'));
    await ended;
    await until(async () => (await running(label)).length === 0);
  });

  it('ends what takes too long, and calls it no fault of the file', async () => {
    const directory = await job();
    const run = runFfmpeg({ directory, command: endless('slow'), caps: { ...PROBE_CAPS, wallMs: 1500 } });
    await expect(run).rejects.toThrow('still running after 1500 ms');
    await until(async () => (await running('slow')).length === 0);
  });

  it('stops a program that writes too much or takes too much memory', async () => {
    const directory = await job();
    const greedy = { ...endless('greedy'), inputOptions: ['-nostdin', '-v', 'error', '-stream_loop', '-1'] };
    const written = await runFfmpeg({
      directory,
      command: greedy,
      caps: { ...PROBE_CAPS, fileBytes: 100_000 },
    });
    expect(written.exitCode).not.toBe(0);
    expect((await stat(join(directory, 'begun.mkv'))).size).toBeLessThanOrEqual(100_000);
    const starved = await runFfmpeg({
      directory,
      command: greedy,
      caps: { ...PROBE_CAPS, memoryBytes: 150_000_000 },
    });
    expect(starved.exitCode).not.toBe(0);
  });

  it('does not begin when already told to stop', async () => {
    const directory = await job();
    const signal = AbortSignal.abort(new Error('before it began'));
    await expect(
      runFfmpeg({ directory, command: endless('never'), caps: PROBE_CAPS, signal }),
    ).rejects.toThrow('before it began');
    await expect(bench.render(clip, { signal })).rejects.toThrow('before it began');
  });

  it('gives a longer clip more of the machine', () => {
    expect(renditionCaps(60_000).cpuSeconds).toBeGreaterThan(renditionCaps(6_000).cpuSeconds);
  });
});

describe('a job’s directory', () => {
  it('holds the input under a name of ours and keeps others out', async () => {
    const odd = bench.file('-y $(touch pwned) %03d.mp4');
    await writeFile(odd, 'bytes');
    const directory = await makeJobDirectory(await mkdtemp(join(bench.directory, 'work-')), odd);
    expect(await readdir(directory)).toEqual(['source']);
    expect((await stat(directory)).mode & 0o777).toBe(0o700);
  });
});
