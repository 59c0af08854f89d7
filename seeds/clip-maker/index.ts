import { Painter, stillOf } from './draw/painter';
import { encode } from './encode';
import type { ClipOptions, FileOptions } from './options';
import { planOf } from './set';
import { type ClipTruth, clipTruth } from './truth';

export type { AngleName } from './angles';
export { BUILD_IDS, type BuildId } from './anthropometry';
export { FAULTS, type Fault, faultsOf } from './faults';
export { IMPLEMENT_KINDS, type ImplementKind } from './implements';
export { LIFT_IDS, type LiftId } from './lift-ids';
export { LIFTS } from './lifts';
export {
  type ClipOptions,
  type FileOptions,
  HAIR_STYLES,
  type Look,
  OUTFITS,
  SCENES,
  SKIN_TONES,
  VIEWS,
  type View,
} from './options';
export { JOINT_NAMES, type JointName } from './skeleton';
export type { Tempo } from './timeline';
export { type ClipTruth, type FrameTruth, clipTruth } from './truth';

const PLAIN_FILE: FileOptions = { codec: 'h264', storedRotated: false, audio: 'none' };

/**
 * Draws a clip into a video file and returns what is known of it. Takes about as long as the clip lasts at 540 × 960
 * and 30 frames a second. Throws when an option is out of range or ffmpeg fails; no half-written file is left behind.
 */
export async function makeClip(options: ClipOptions, outPath: string): Promise<ClipTruth> {
  const plan = planOf(options);
  const painter = new Painter(plan);
  await encode(
    {
      width: plan.width,
      height: plan.height,
      fps: plan.fps,
      frameCount: plan.frameCount,
      frame: (i) => painter.frame(i),
    },
    { ...PLAIN_FILE, ...options.file },
    outPath,
  );
  return clipTruth(options);
}

/** One frame of a clip as PNG bytes, at an instant in milliseconds. */
export function makeStill(options: ClipOptions, atMs: number): Buffer {
  const plan = planOf(options);
  return stillOf(plan, Math.min(plan.frameCount - 1, Math.round((atMs * plan.fps) / 1000)));
}
