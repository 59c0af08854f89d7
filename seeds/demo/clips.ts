import { spawn } from 'node:child_process';
import { writeFile } from 'node:fs/promises';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { clipTruth, type ClipOptions, type LiftId, type View } from '../clip-maker';

export interface DrawnPair {
  readonly lift: LiftId;
  /** Draws the person: build, clothes, gym. */
  readonly seed: number;
  /** Doses by drawn fault. */
  readonly faults: Readonly<Record<string, number>>;
  /** The views that are filmed. */
  readonly views: readonly View[];
}

/** Fewer than a phone's thirty, so that a first start takes less long; a step is still a twenty-fifth of a second. */
const FPS = 25;

const REPS: Partial<Record<LiftId, number>> = { 'split-squat-hold': 1, 'hollow-hold': 1, swing: 3 };
const TEMPO: Partial<Record<LiftId, ClipOptions['tempo']>> = {
  'split-squat-hold': { downS: 1.2, pauseBottomS: 1.6, upS: 1, pauseTopS: 0.2 },
};

function optionsOf(pair: DrawnPair, view: View): ClipOptions {
  return {
    lift: pair.lift,
    view,
    seed: pair.seed,
    reps: REPS[pair.lift] ?? 2,
    ...(TEMPO[pair.lift] ? { tempo: TEMPO[pair.lift] } : {}),
    faults: { ...pair.faults },
    fps: FPS,
    sway: 0.25,
    size: { shortPx: 540, longPx: 960 },
  };
}

/** An instant of a rep: its lowest or highest point, or where one drawn fault first shows almost in full. */
export type Moment = 'bottom' | 'top' | { readonly fault: string };

const ALMOST_IN_FULL = 0.9;

/** Where a moment of a rep lies in the drawn clip, ms; `rep` counts from 1. */
export function momentMs(pair: DrawnPair, view: View, moment: Moment, rep: number): number {
  const truth = clipTruth(optionsOf(pair, view));
  if (typeof moment === 'string') {
    const instant = truth.instants.find((one) => one.kind === moment && one.rep === rep);
    if (!instant) throw new Error(`the drawn ${pair.lift} has no ${moment} of rep ${String(rep)}`);
    return Math.round(instant.atMs);
  }
  const shown = truth.faults.find((one) => one.id === moment.fault);
  if (!shown) throw new Error(`the drawn ${pair.lift} does not show "${moment.fault}"`);
  const clean = clipTruth(optionsOf({ ...pair, faults: {} }, view));
  const phases = truth.phases.filter((phase) => phase.rep === rep);
  const changes = truth.frames.flatMap(({ frame, atMs, angles }) => {
    const without = clean.frames[frame];
    const within = phases.some((phase) => atMs >= phase.startMs && atMs < phase.endMs);
    return within && without
      ? [{ atMs, change: Math.abs(angles[shown.angle] - without.angles[shown.angle]) }]
      : [];
  });
  const most = Math.max(...changes.map(({ change }) => change));
  const first = changes.find(({ change }) => change >= ALMOST_IN_FULL * most);
  if (!first) throw new Error(`the drawn ${pair.lift} has no rep ${String(rep)}`);
  return Math.round(first.atMs);
}

export const fileOf = (dir: string, pair: DrawnPair, view: View) =>
  join(
    dir,
    `${pair.lift}-${String(pair.seed)}-${Object.entries(pair.faults).flat().join('-') || 'clean'}-${view}.mp4`,
  );

function draw(options: ClipOptions, file: string): Promise<void> {
  const faults = Object.entries(options.faults ?? {}).flatMap(([id, dose]) => [
    '--fault',
    `${id}:${String(dose)}`,
  ]);
  const tempo = options.tempo
    ? [
        '--tempo',
        [options.tempo.downS, options.tempo.pauseBottomS, options.tempo.upS, options.tempo.pauseTopS].join(
          ',',
        ),
      ]
    : [];
  return new Promise((resolve, reject) => {
    const args = [
      ...['--import', 'tsx', join(import.meta.dirname, '..', 'clip-maker', 'cli.ts')],
      ...['--lift', options.lift, '--view', options.view, '--out', file],
      ...['--seed', String(options.seed), '--reps', String(options.reps), '--sway', String(options.sway)],
      ...['--fps', String(options.fps)],
      ...['--size', `${String(options.size?.shortPx)}x${String(options.size?.longPx)}`],
      ...tempo,
      ...faults,
    ];
    let errors = '';
    const child = spawn(process.execPath, args, { stdio: ['ignore', 'ignore', 'pipe'] });
    child.stderr.on('data', (chunk: Buffer) => {
      errors += chunk.toString();
    });
    child.once('error', reject);
    child.once('exit', (code) => {
      if (code === 0) resolve();
      else reject(new Error(`a clip could not be drawn: ${errors}`));
    });
  });
}

/** Draws each pair from its views into `dir`, as many at once as the machine has cores. */
export async function drawAll(
  dir: string,
  pairs: readonly DrawnPair[],
  drawn: (count: number, of: number) => void,
): Promise<void> {
  const wanted = new Map<string, ClipOptions>();
  for (const pair of pairs) {
    for (const view of pair.views) wanted.set(fileOf(dir, pair, view), optionsOf(pair, view));
  }
  const queue = [...wanted];
  const total = queue.length;
  let done = 0;
  const drawOne = async () => {
    for (let next = queue.shift(); next; next = queue.shift()) {
      const [file, options] = next;
      await draw(options, file);
      done += 1;
      drawn(done, total);
    }
  };
  await Promise.all(Array.from({ length: Math.max(1, availableParallelism()) }, drawOne));
}

/** A file that begins as a clip and holds none. */
export async function writeBrokenClip(file: string): Promise<void> {
  const bytes = Buffer.alloc(60_000, 7);
  bytes.writeUInt32BE(24, 0);
  bytes.write('ftypisom', 4, 'latin1');
  await writeFile(file, bytes);
}
