import { existsSync, mkdirSync, renameSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { makeClip, type ClipOptions } from '../../../seeds/clip-maker';

const QUICK = { downS: 0.7, pauseBottomS: 0.1, upS: 0.6, pauseTopS: 0.1 };

/** One rep of a goblet squat as a phone writes it: 1080p60 HEVC in .mov, lying down with a display matrix, located. */
const AS_FROM_A_PHONE: Pick<ClipOptions, 'lift' | 'reps' | 'fps' | 'size' | 'file' | 'tempo'> = {
  lift: 'goblet-squat',
  reps: 1,
  fps: 60,
  size: { shortPx: 1080, longPx: 1920 },
  tempo: QUICK,
  file: {
    codec: 'hevc',
    storedRotated: true,
    audio: 'tone',
    location: { latitude: 57.7, longitude: 11.97 },
    device: { make: 'Invented', model: 'Pocket 3' },
  },
};
const PLAIN: Pick<ClipOptions, 'lift' | 'reps' | 'fps' | 'size' | 'tempo'> = {
  lift: 'goblet-squat',
  reps: 1,
  fps: 30,
  size: { shortPx: 360, longPx: 640 },
  tempo: QUICK,
};

const CLIPS = {
  'phone-front.mov': { ...AS_FROM_A_PHONE, view: 'front', seed: 4, faults: { 'heels-lift': 0.6 } },
  'phone-side.mov': { ...AS_FROM_A_PHONE, view: 'side', seed: 4, faults: { 'heels-lift': 0.6 } },
  'plain-front.mp4': { ...PLAIN, view: 'front', seed: 4 },
  'plain-side.mp4': { ...PLAIN, view: 'side', seed: 4 },
} as const satisfies Record<string, ClipOptions>;

export type ClipName = keyof typeof CLIPS;

/** The path of a drawn clip, made at the first call of a run. */
export async function phoneClip(name: ClipName): Promise<string> {
  const dir = join(tmpdir(), 'midfoot-clips');
  mkdirSync(dir, { recursive: true });
  const path = join(dir, name);
  if (existsSync(path)) return path;
  const unfinished = join(dir, `unfinished-${name}`);
  await makeClip(CLIPS[name], unfinished);
  renameSync(unfinished, path);
  return path;
}
