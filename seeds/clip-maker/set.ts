import { type AngleName, type Angles, anglesOf } from './angles';
import { BUILD_IDS, type Body, bodyOf } from './anthropometry';
import { type Camera, type Shake, STILL, framed } from './camera';
import { FAULTS } from './faults';
import { IMPLEMENT_KINDS, type Implement, type ImplementKind, bellRadius } from './implements';
import { LIFT_IDS } from './lift-ids';
import { LIFTS, type LiftModel, type Moment } from './lifts';
import { type ClipOptions, type Look, OUTFITS, SCENES, SKIN_TONES, type Scene, VIEWS } from './options';
import { seeded, wander } from './random';
import { type Skeleton, solve } from './skeleton';
import { type Tempo, type Timeline, phaseAt, timelineOf } from './timeline';
import { type V3, add, along } from './vec';

/** Options with every gap filled. */
export interface ClipPlan {
  options: ClipOptions;
  lift: LiftModel;
  seed: number;
  reps: number;
  tempo: Tempo;
  depth: number;
  fps: number;
  width: number;
  height: number;
  offAxisDeg: number;
  look: Look;
  scene: Scene;
  implement: ImplementKind;
  loadKg: number;
  faults: Record<string, number>;
  sway: number;
  noise: number;
  body: Body;
  timeline: Timeline;
  frameCount: number;
}

/** One frame of the set in space. */
export interface Instant {
  skeleton: Skeleton;
  held: Implement[];
  angles: Angles;
}

const HAIR_COLOURS = ['#2a1d17', '#4a3021', '#6d4a2c', '#1b1a1c', '#8a6a42', '#7d7873'];

function within(name: string, value: number, low: number, high: number): number {
  if (!(value >= low && value <= high))
    throw new RangeError(`${name} is ${value}; it must lie between ${low} and ${high}`);
  return value;
}

function pick<T>(items: readonly T[], roll: number): T {
  const item = items[Math.floor(roll * items.length)];
  if (item === undefined) throw new Error('Nothing to pick from');
  return item;
}

/** Who is filmed when nobody says: drawn from the seed. */
export function lookOf(seed: number, given: Partial<Look> = {}): Look {
  const next = seeded(seed * 7 + 3);
  const build = pick(BUILD_IDS, next());
  const hair = pick(
    build === 'slight' || build === 'compact'
      ? (['bun', 'tail', 'crop'] as const)
      : (['short', 'crop', 'shaved', 'curls'] as const),
    next(),
  );
  return {
    build,
    hair,
    skin: pick(SKIN_TONES, next()),
    hairColour: pick(HAIR_COLOURS, next()),
    outfit: pick(OUTFITS, next()),
    legwear: build === 'slight' || build === 'compact' ? 'leggings' : 'shorts',
    beard: (build === 'broad' || build === 'sturdy' || build === 'even') && next() < 0.4,
    ...given,
  };
}

/** Checks options and fills their gaps. Throws a RangeError or Error that names what is wrong. */
export function planOf(options: ClipOptions): ClipPlan {
  const lift = LIFTS[options.lift];
  if (!lift) throw new Error(`Unknown lift "${String(options.lift)}"; known are ${LIFT_IDS.join(', ')}`);
  if (!VIEWS.includes(options.view))
    throw new Error(`Unknown view "${String(options.view)}"; known are front and side`);
  const faults = options.faults ?? {};
  for (const [id, dose] of Object.entries(faults)) {
    if (!FAULTS.some((fault) => fault.lift === lift.id && fault.id === id))
      throw new Error(`${lift.name} has no fault "${id}"`);
    within(`Dose of ${id}`, dose, 0, 1);
  }
  const implement = options.implement ?? lift.implement;
  if (!IMPLEMENT_KINDS.includes(implement)) throw new Error(`Unknown implement "${String(implement)}"`);
  const seed = options.seed ?? 1;
  const look = lookOf(seed, options.look);
  const { shortPx, longPx } = options.size ?? { shortPx: 540, longPx: 960 };
  for (const side of [shortPx, longPx]) {
    within('Side of the picture', side, 64, 4096);
    if (side % 2) throw new RangeError(`Side of the picture is ${side}; it must be even`);
  }
  const portrait = (options.orientation ?? 'portrait') === 'portrait';
  const tempo = { ...lift.tempo, ...options.tempo };
  for (const [name, s] of Object.entries(tempo)) within(`Tempo ${name}`, s, 0, 60);
  if (tempo.downS < 0.1 || tempo.upS < 0.1)
    throw new RangeError('Lowering and lifting take at least 0.1 s each');
  const reps = within('Reps', options.reps ?? lift.reps, 1, 50);
  const fps = within('Frame rate', options.fps ?? 30, 1, 240);
  const timeline = timelineOf(lift.first, reps, tempo, 450, lift.leadOutMs);
  return {
    options,
    lift,
    seed,
    reps,
    tempo,
    depth: within('Depth', options.depth ?? 1, 0.3, 1.1),
    fps,
    width: portrait ? shortPx : longPx,
    height: portrait ? longPx : shortPx,
    offAxisDeg: within('Camera angle off axis', options.offAxisDeg ?? 0, -90, 90),
    look,
    scene: options.scene ?? pick(SCENES, seeded(seed * 11 + 5)()),
    implement,
    loadKg: within('Load', options.loadKg ?? lift.loadKg, 0, 300),
    faults,
    sway: within('Sway', options.sway ?? 0, 0, 1),
    noise: within('Noise', options.noise ?? 0.5, 0, 1),
    body: bodyOf(look.build),
    timeline,
    frameCount: Math.max(1, Math.round((timeline.durationMs / 1000) * fps)),
  };
}

/** Solves the figure at an instant of the clip. */
export function instantAt(plan: ClipPlan, tMs: number): Instant {
  const { phase, progress } = phaseAt(plan.timeline, tMs);
  const moment: Moment = {
    body: plan.body,
    kind: phase.kind,
    s: progress,
    rep: phase.rep,
    depth: plan.depth,
    loadKg: plan.loadKg,
    implement: plan.implement,
    dose: (id) => plan.faults[id] ?? 0,
    drift: [
      wander(plan.seed * 3 + 1, 2.7)(tMs / 1000),
      wander(plan.seed * 3 + 2, 3.9)(tMs / 1000),
      wander(plan.seed * 3 + 3, 0.34)(tMs / 1000),
    ],
  };
  const skeleton = solve(plan.body, plan.lift.pose(moment));
  const held = plan.lift.held(skeleton, moment);
  return { skeleton, held, angles: anglesOf(skeleton, held) };
}

/** The instant shown by a frame, milliseconds. */
export const timeOfFrame = (plan: ClipPlan, frame: number): number => (frame * 1000) / plan.fps;

/** Every frame of the set. */
export const instantsOf = (plan: ClipPlan): Instant[] =>
  Array.from({ length: plan.frameCount }, (_, frame) => instantAt(plan, timeOfFrame(plan, frame)));

/** Hand-held sway at an instant: about 1 % of the width at strength 1. */
export function shakeAt(plan: ClipPlan, tMs: number): Shake {
  if (plan.sway === 0) return STILL;
  const t = tMs / 1000;
  const size = plan.sway * Math.min(plan.width, plan.height);
  return {
    dx: 0.013 * size * wander(plan.seed + 101, 2.1)(t) + 0.002 * size * wander(plan.seed + 102, 0.4)(t),
    dy: 0.011 * size * wander(plan.seed + 103, 1.7)(t) + 0.002 * size * wander(plan.seed + 104, 0.37)(t),
    roll: 0.007 * plan.sway * wander(plan.seed + 105, 2.9)(t),
  };
}

/** The camera of a clip, framed so that the set fits, as filmed and as it would be without faults at full range. */
export function cameraOf(plan: ClipPlan): Camera {
  const calm: ClipPlan = { ...plan, depth: 1, faults: {} };
  const points: V3[] = [];
  const h = plan.body.heightM;
  const put = (instant: Instant): void => {
    const j = instant.skeleton.joints;
    for (const point of Object.values(j))
      points.push(add(point, [0, 0.04, 0]), add(point, [0.06, -0.04, 0]), add(point, [-0.06, 0, 0]));
    points.push(along(j.head, instant.skeleton.head.up, 0.09 * h));
    for (const item of instant.held) {
      const r = item.kind === 'kettlebell' ? bellRadius(plan.loadKg) : 0.1;
      points.push(add(item.at, [r, r, 0]), add(item.at, [-r, -r, 0]));
      if (item.kind === 'barbell')
        points.push(along(item.at, item.axis, 0.66), along(item.at, item.axis, -0.66));
    }
  };
  const steps = 24;
  for (const source of [calm, plan]) {
    for (let i = 0; i <= steps; i++) put(instantAt(source, (source.timeline.durationMs * i) / steps));
  }
  const place = plan.lift.camera[plan.options.view];
  return framed(place, plan.offAxisDeg, plan.width, plan.height, points, h);
}

/** The value of one angle over the whole clip, degrees. */
export const curveOf = (instants: readonly Instant[], name: AngleName): number[] =>
  instants.map(({ angles }) => angles[name]);
