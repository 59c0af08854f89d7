import { spawn } from 'node:child_process';
import { copyFile, mkdir, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { makeClip } from '../../seeds/clip-maker';
import { DEFAULT_LIMITS, DEFAULT_SHORT_SIDE, describeJail, makeRenditions } from '../../server/media';
import { buildRenditionArguments, flattenArguments } from '../../server/media/build-args';
import { makeJobDirectory } from '../../server/media/job-directory';
import { probeSource } from '../../server/media/probe';
import { ms, sideBySide, times, type Row } from './table';

const ROUNDS = 3;

function run(args: readonly string[], cwd: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn('ffmpeg', args, { cwd, stdio: 'ignore' });
    child.once('error', reject);
    child.once('exit', (code) => {
      if (code === 0) resolve();
      else reject(new Error(`bare ffmpeg ended with ${String(code)}`));
    });
  });
}

/** The whole media job of a 6 s 1080p60 HEVC clip against bare ffmpeg with the same arguments. */
export async function benchMedia(): Promise<Row[]> {
  const dir = await mkdtemp(join(tmpdir(), 'midfoot-bench-'));
  try {
    const source = join(dir, 'clip.mov');
    await makeClip(
      {
        lift: 'goblet-squat',
        view: 'side',
        seed: 4,
        reps: 2,
        fps: 60,
        size: { shortPx: 1080, longPx: 1920 },
        tempo: { downS: 1.2, pauseBottomS: 0.2, upS: 1, pauseTopS: 0.2 },
        file: { codec: 'hevc', storedRotated: true, audio: 'tone' },
      },
      source,
    );
    const probing = await makeJobDirectory(dir, source);
    const facts = await probeSource(probing, { limits: DEFAULT_LIMITS });
    const command = buildRenditionArguments(facts, { limits: DEFAULT_LIMITS, shortSide: DEFAULT_SHORT_SIDE });
    let count = 0;
    const { bareMs, oursMs } = await sideBySide(
      ROUNDS,
      async () => {
        const bareDir = join(dir, `bare-${String((count += 1))}`);
        await mkdir(bareDir);
        await copyFile(source, join(bareDir, 'source'));
        await run(['-y', ...flattenArguments(command)], bareDir);
      },
      async () => {
        const workDir = join(dir, `ours-${String((count += 1))}`);
        await mkdir(workDir);
        await makeRenditions({ inputPath: source, workDir });
      },
    );
    const jail = (await describeJail()).split(':')[0] ?? '';
    return [
      {
        metric: `media job, ${(facts.durationMs / 1000).toFixed(1)} s 1080p60 HEVC, wall (${jail}) / bare ffmpeg, same arguments`,
        bare: ms(bareMs),
        ours: ms(oursMs),
        ratio: times(oursMs / bareMs),
        target: '≤ 1.25',
      },
    ];
  } finally {
    await rm(dir, { recursive: true, force: true });
  }
}
