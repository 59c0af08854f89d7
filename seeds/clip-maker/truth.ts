import type { AngleName } from './angles';
import { project } from './camera';
import { FAULTS } from './faults';
import type { LiftId } from './lift-ids';
import type { ClipOptions, Look, Scene, View } from './options';
import { cameraOf, instantsOf, planOf, shakeAt, timeOfFrame } from './set';
import { JOINT_NAMES, type JointName } from './skeleton';
import type { Phase, RepInstant, Tempo } from './timeline';
import type { V3 } from './vec';

/** A point as a fraction of the frame's width and height, from the top left. */
export interface FramePoint {
  x: number;
  y: number;
}

export interface FrameTruth {
  frame: number;
  atMs: number;
  joints: Record<JointName, FramePoint>;
  /** Degrees, true in space; see AngleName. */
  angles: Record<AngleName, number>;
  implements: (FramePoint & { kind: string })[];
}

/** What is known of a clip. JSON-safe; the same options give the same bytes. */
export interface ClipTruth {
  format: 'midfoot-clip-truth-1';
  lift: LiftId;
  view: View;
  seed: number;
  fps: number;
  width: number;
  height: number;
  frameCount: number;
  durationMs: number;
  reps: number;
  tempo: Tempo;
  depth: number;
  offAxisDeg: number;
  look: Look;
  scene: Scene;
  heightM: number;
  implement: string;
  loadKg: number;
  faults: { id: string; name: string; dose: number; angle: AngleName; change: 'increases' | 'decreases' }[];
  primaryAngle: AngleName;
  phases: Phase[];
  instants: RepInstant[];
  frames: FrameTruth[];
}

const rounded = (value: number, digits: number): number => {
  const f = 10 ** digits;
  const r = Math.round(value * f) / f;
  return r === 0 ? 0 : r;
};

/** Computes the truth of a clip without drawing it. Pure. Throws as `planOf` does when an option is out of range. */
export function clipTruth(options: ClipOptions): ClipTruth {
  const plan = planOf(options);
  const camera = cameraOf(plan);
  const frames = instantsOf(plan).map((instant, frame): FrameTruth => {
    const atMs = timeOfFrame(plan, frame);
    const shake = shakeAt(plan, atMs);
    const point = (at: V3): FramePoint => {
      const seen = project(camera, at, shake);
      return { x: rounded(seen.x / plan.width, 5), y: rounded(seen.y / plan.height, 5) };
    };
    const entries = JOINT_NAMES.map((name) => [name, point(instant.skeleton.joints[name])] as const);
    const angles = Object.entries(instant.angles).map(([name, value]) => [name, rounded(value, 2)] as const);
    return {
      frame,
      atMs: rounded(atMs, 3),
      joints: Object.fromEntries(entries) as Record<JointName, FramePoint>,
      angles: Object.fromEntries(angles) as Record<AngleName, number>,
      implements: instant.held.map((item) => ({ kind: item.kind, ...point(item.at) })),
    };
  });
  return {
    format: 'midfoot-clip-truth-1',
    lift: plan.lift.id,
    view: options.view,
    seed: plan.seed,
    fps: plan.fps,
    width: plan.width,
    height: plan.height,
    frameCount: plan.frameCount,
    durationMs: plan.timeline.durationMs,
    reps: plan.reps,
    tempo: plan.tempo,
    depth: plan.depth,
    offAxisDeg: plan.offAxisDeg,
    look: plan.look,
    scene: plan.scene,
    heightM: plan.body.heightM,
    implement: plan.implement,
    loadKg: plan.loadKg,
    faults: FAULTS.filter((fault) => fault.lift === plan.lift.id && fault.id in plan.faults).map((fault) => ({
      id: fault.id,
      name: fault.name,
      dose: plan.faults[fault.id] ?? 0,
      angle: fault.angle,
      change: fault.change,
    })),
    primaryAngle: plan.lift.primaryAngle,
    phases: plan.timeline.phases,
    instants: plan.timeline.instants,
    frames,
  };
}
