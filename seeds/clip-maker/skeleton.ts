import { type Body, MASS } from './anthropometry';
import {
  FORWARD,
  RIGHT,
  UP,
  type V3,
  add,
  along,
  cross,
  distance,
  dot,
  length,
  mix,
  radians,
  sagittal,
  scale,
  squareTo,
  sub,
  turn,
  unit,
} from './vec';

export const SIDES = ['left', 'right'] as const;
export type Side = (typeof SIDES)[number];
/** −1 for the left side, +1 for the right, along z. */
export const sign = (side: Side): number => (side === 'right' ? 1 : -1);

export const JOINT_NAMES = [
  'head', 'neck', 'midHip', 'midBack',
  'shoulderLeft', 'shoulderRight', 'elbowLeft', 'elbowRight', 'wristLeft', 'wristRight', 'handLeft', 'handRight',
  'hipLeft', 'hipRight', 'kneeLeft', 'kneeRight', 'ankleLeft', 'ankleRight',
  'heelLeft', 'heelRight', 'ballLeft', 'ballRight', 'toeLeft', 'toeRight',
] as const; // prettier-ignore
export type JointName = (typeof JOINT_NAMES)[number];

/** Where a planted foot stands: its middle on the floor, metres; angles in degrees. */
export interface FootPlace {
  x: number;
  z: number;
  toeOut: number;
  /** The foot's pitch about the ball: 0 flat, positive with the heel in the air. */
  heelLift: number;
}

export type LegPose =
  /** `kneesUp` is for a figure on its back, whose knees point to the ceiling. */
  | { kind: 'planted'; foot: FootPlace; kneeIn: number; kneesUp?: boolean }
  | { kind: 'free'; hip: number; knee: number; ankle: number; spread: number };

/** The trunk once its bends are known, for arms that reach relative to it. Directions are unit vectors. */
export interface Torso {
  midHip: V3;
  midShoulder: V3;
  shoulder: Record<Side, V3>;
  pelvisUp: V3;
  pelvisFront: V3;
  chestUp: V3;
  chestFront: V3;
  armLength: number;
}

export interface ArmPose {
  wrist: V3;
  /** Direction the elbow points to. */
  pole: V3;
  /** Direction from wrist to knuckles; the forearm's own when left out. */
  handDirection?: V3;
  /** Direction the palm faces, for drawing. */
  palm?: V3;
}

/** One instant of a figure, before legs, balance and arms are solved. Angles in degrees. */
export interface Pose {
  /** Lean of the pelvis from upright, forward positive (−90 lies on the back). */
  trunk: number;
  /** Flexion shared by the low back and by the upper back; negative arches. */
  lumbar: number;
  thoracic: number;
  /** Lean of the whole trunk to the figure's right. */
  sideLean?: number;
  /** Pitch of the head from upright, forward positive. */
  gaze: number;
  shrug: number;
  root:
    | { kind: 'balanced'; lead: Side; knee: number; overX: number; carriedKg: number; leadShare?: number }
    | { kind: 'placed'; at: V3 };
  legs: Record<Side, LegPose>;
  arms: (torso: Torso) => Record<Side, ArmPose>;
}

export interface Foot {
  heel: V3;
  ankle: V3;
  ball: V3;
  toe: V3;
  /** The sole's upward normal behind and in front of the ball. */
  up: V3;
  toeUp: V3;
  /** Heel to ball. */
  forward: V3;
}

export interface Skeleton {
  joints: Record<JointName, V3>;
  torso: Torso;
  /** Mid-hip to the base of the neck in equal steps, and the trunk's front at each. */
  spine: { at: V3; up: V3; front: V3 }[];
  right: V3;
  head: { centre: V3; up: V3; front: V3 };
  kneePole: Record<Side, V3>;
  elbowPole: Record<Side, V3>;
  hand: Record<Side, { direction: V3; palm: V3 }>;
  feet: Record<Side, Foot>;
  centreOfMass: V3;
}

/** Two bones of lengths a and b from `from` towards `to`; the middle joint bends towards `pole`. */
export function bend(from: V3, to: V3, a: number, b: number, pole: V3): { middle: V3; end: V3 } {
  const line = sub(to, from);
  const reach = Math.max(Math.abs(a - b) + 1e-4, Math.min(a + b - 1e-5, length(line)));
  const direction = unit(line);
  const out = squareTo(pole, direction);
  const cos = (a * a + reach * reach - b * b) / (2 * a * reach);
  const sin = Math.sqrt(Math.max(0, 1 - cos * cos));
  return {
    middle: add(along(from, direction, a * cos), scale(out, a * sin)),
    end: along(from, direction, reach),
  };
}

/** Distance from hip to ankle at a knee flexion in degrees. */
export function legReach(body: Body, flexion: number): number {
  const c = Math.cos(radians(180 - flexion));
  return Math.sqrt(body.thigh ** 2 + body.shank ** 2 - 2 * body.thigh * body.shank * c);
}

/** Points of a foot that stands on the floor, its ball planted. */
export function plantedFoot(body: Body, place: FootPlace, side: Side): Foot {
  const yaw = place.toeOut * sign(side);
  const forward = turn(FORWARD, UP, -yaw);
  const across = turn(RIGHT, UP, -yaw);
  const l = body.footLength;
  const ball = along([place.x, 0, place.z], forward, 0.2 * l);
  const toe = along(ball, forward, 0.3 * l);
  const back = turn(scale(forward, -1), across, place.heelLift * -1);
  const up = turn(UP, across, place.heelLift * -1);
  const heel = along(ball, back, 0.7 * l);
  const ankle = along(along(ball, back, 0.47 * l), up, body.ankleHeight);
  return { heel, ankle, ball, toe, up, toeUp: UP, forward: scale(back, -1) };
}

function freeFoot(body: Body, ankle: V3, shankDirection: V3, front: V3, right: V3, ankleAngle: number): Foot {
  // At 0° the foot is square to the shank; positive points the toes.
  const forward = turn(squareTo(front, shankDirection), right, -ankleAngle);
  const up = unit(cross(right, forward));
  const l = body.footLength;
  const under = along(ankle, up, -body.ankleHeight);
  const ball = along(under, forward, 0.47 * l);
  const heel = along(under, forward, -0.23 * l);
  return { heel, ankle, ball, toe: along(ball, forward, 0.3 * l), up, toeUp: up, forward };
}

function buildTorso(
  body: Body,
  pose: Pose,
  midHip: V3,
): { torso: Torso; spine: Skeleton['spine']; right: V3 } {
  const roll = (a: V3): V3 => turn(a, FORWARD, pose.sideLean ?? 0);
  const right = roll(RIGHT);
  const steps = 12;
  const spine: Skeleton['spine'] = [];
  let at = midHip;
  for (let i = 0; i <= steps; i++) {
    const s = i / steps;
    // The low back bends between 15 and 50 % of the trunk's length, the upper back above it.
    const low = Math.max(0, Math.min(1, (s - 0.15) / 0.35));
    const high = Math.max(0, Math.min(1, (s - 0.45) / 0.45));
    const lean = pose.trunk + pose.lumbar * low + pose.thoracic * high;
    const up = roll(sagittal(lean));
    const front = roll(sagittal(lean + 90));
    if (i > 0) at = along(at, up, body.trunk / steps);
    spine.push({ at, up, front });
  }
  const first = spine[0] ?? { at: midHip, up: UP, front: FORWARD };
  const last = spine[steps] ?? first;
  const half = body.shoulderHalf;
  const lift = pose.shrug * body.heightM;
  const socket = (side: Side): V3 => along(along(last.at, right, half * sign(side)), last.up, lift);
  return {
    right,
    spine,
    torso: {
      midHip,
      midShoulder: last.at,
      shoulder: { left: socket('left'), right: socket('right') },
      pelvisUp: first.up,
      pelvisFront: first.front,
      chestUp: last.up,
      chestFront: last.front,
      armLength: body.upperArm + body.forearm,
    },
  };
}

/** The shoulder joint rises and moves in as the arm goes overhead. */
function raisedShoulder(body: Body, torso: Torso, right: V3, side: Side, wrist: V3): V3 {
  const base = torso.shoulder[side];
  const height = dot(unit(sub(wrist, base)), torso.chestUp);
  const front = dot(unit(sub(wrist, base)), torso.chestFront);
  const raise = Math.max(0, (height + 0.25) / 1.25) ** 1.5;
  const forwards = Math.max(0, front) * (1 - Math.abs(height)) * 0.012 * body.heightM;
  const up = along(base, torso.chestUp, 0.034 * body.heightM * raise);
  return along(along(up, right, -sign(side) * 0.02 * body.heightM * raise), torso.chestFront, forwards);
}

function solveAt(body: Body, pose: Pose, midHip: V3): Skeleton {
  const { torso: base, spine, right } = buildTorso(body, pose, midHip);
  const reached = pose.arms(base);
  const torso: Torso = {
    ...base,
    shoulder: {
      left: raisedShoulder(body, base, right, 'left', reached.left.wrist),
      right: raisedShoulder(body, base, right, 'right', reached.right.wrist),
    },
  };
  const neckUp = unit(add(scale(torso.chestUp, 0.5), scale(sagittal(pose.gaze), 0.5)));
  const skull = along(along(torso.midShoulder, neckUp, body.neck), torso.chestFront, 0.004 * body.heightM);
  const headUp = turn(sagittal(pose.gaze), FORWARD, (pose.sideLean ?? 0) * 0.4);
  const headFront = unit(cross(headUp, cross(sagittal(pose.gaze + 90), headUp)));
  const centre = along(along(skull, headUp, body.head * 0.5), headFront, 0.014 * body.heightM);

  const joints: Record<string, V3> = {
    head: centre,
    neck: skull,
    midHip,
    midBack: (spine[5] ?? { at: midHip }).at,
  };
  const kneePole: Partial<Record<Side, V3>> = {};
  const elbowPole: Partial<Record<Side, V3>> = {};
  const hand: Partial<Skeleton['hand']> = {};
  const feet: Partial<Record<Side, Foot>> = {};
  for (const side of SIDES) {
    const name = side === 'left' ? 'Left' : 'Right';
    const hip = along(midHip, right, body.hipHalf * sign(side));
    const leg = pose.legs[side];
    let knee: V3, foot: Foot, pole: V3;
    if (leg.kind === 'planted') {
      foot = plantedFoot(body, leg.foot, side);
      pole = leg.kneesUp ? UP : turn(FORWARD, UP, -sign(side) * (leg.foot.toeOut - leg.kneeIn));
      knee = bend(hip, foot.ankle, body.thigh, body.shank, pole).middle;
    } else {
      const thighDirection = turn(
        turn(scale(torso.pelvisUp, -1), right, leg.hip),
        torso.pelvisFront,
        -leg.spread * sign(side),
      );
      const shankDirection = turn(thighDirection, right, -leg.knee);
      knee = along(hip, thighDirection, body.thigh);
      pole = torso.pelvisFront;
      foot = freeFoot(
        body,
        along(knee, shankDirection, body.shank),
        shankDirection,
        torso.pelvisFront,
        right,
        leg.ankle,
      );
    }
    const arm = reached[side];
    const shoulder = torso.shoulder[side];
    const { middle: elbow, end: wrist } = bend(shoulder, arm.wrist, body.upperArm, body.forearm, arm.pole);
    const direction = arm.handDirection ? unit(arm.handDirection) : unit(sub(wrist, elbow));
    Object.assign(joints, {
      [`hip${name}`]: hip,
      [`knee${name}`]: knee,
      [`ankle${name}`]: foot.ankle,
      [`heel${name}`]: foot.heel,
      [`ball${name}`]: foot.ball,
      [`toe${name}`]: foot.toe,
      [`shoulder${name}`]: shoulder,
      [`elbow${name}`]: elbow,
      [`wrist${name}`]: wrist,
      [`hand${name}`]: along(wrist, direction, 0.6 * body.hand),
    });
    kneePole[side] = pole;
    elbowPole[side] = arm.pole;
    hand[side] = { direction, palm: arm.palm ?? scale(right, -sign(side)) };
    feet[side] = foot;
  }
  const skeleton: Skeleton = {
    joints: joints as Record<JointName, V3>,
    torso,
    spine,
    right,
    head: { centre, up: headUp, front: headFront },
    kneePole: kneePole as Record<Side, V3>,
    elbowPole: elbowPole as Record<Side, V3>,
    hand: hand as Skeleton['hand'],
    feet: feet as Record<Side, Foot>,
    centreOfMass: midHip,
  };
  return { ...skeleton, centreOfMass: centreOfMass(skeleton) };
}

/** The body's centre of mass from segment masses, metres; what the hands carry is not in it. */
export function centreOfMass({ joints: j, spine }: Skeleton): V3 {
  let sum: V3 = [0, 0, 0];
  let total = 0;
  const put = (at: V3, share: number): void => {
    sum = along(sum, at, share);
    total += share;
  };
  put(mix(j.midHip, (spine[12] ?? { at: j.neck }).at, MASS.trunk.centre), MASS.trunk.share);
  put(j.head, MASS.head.share);
  for (const side of ['Left', 'Right'] as const) {
    put(mix(j[`hip${side}`], j[`knee${side}`], MASS.thigh.centre), MASS.thigh.share);
    put(mix(j[`knee${side}`], j[`ankle${side}`], MASS.shank.centre), MASS.shank.share);
    put(mix(j[`heel${side}`], j[`toe${side}`], MASS.foot.centre), MASS.foot.share);
    put(mix(j[`shoulder${side}`], j[`elbow${side}`], MASS.upperArm.centre), MASS.upperArm.share);
    put(mix(j[`elbow${side}`], j[`wrist${side}`], MASS.forearm.centre), MASS.forearm.share);
    put(j[`hand${side}`], MASS.hand.share);
  }
  return scale(sum, 1 / total);
}

/**
 * Solves a pose. With a balanced root the lead knee has exactly the flexion asked for, the feet stay where they are
 * planted, and the hips move until body and load together stand over `overX`.
 */
export function solve(body: Body, pose: Pose): Skeleton {
  const root = pose.root;
  if (root.kind === 'placed') return solveAt(body, pose, root.at);
  const leg = pose.legs[root.lead];
  if (leg.kind !== 'planted') throw new Error('A balanced figure needs a planted lead leg');
  const { ankle } = plantedFoot(body, leg.foot, root.lead);
  const reach = legReach(body, root.knee);
  const right = turn(RIGHT, FORWARD, pose.sideLean ?? 0);
  const offset = scale(right, body.hipHalf * sign(root.lead));
  const hipsAt = (x: number): V3 => {
    const dx = x + offset[0] - ankle[0];
    const dz = offset[2] - ankle[2];
    const dy = Math.sqrt(Math.max(0.01, reach * reach - dx * dx - dz * dz));
    return [x, ankle[1] + dy - offset[1], 0];
  };
  const furthest = Math.sqrt(Math.max(0, reach * reach - (offset[2] - ankle[2]) ** 2)) * 0.98;
  let x = root.overX;
  let skeleton = solveAt(body, pose, hipsAt(x));
  for (let i = 0; i < 24; i++) {
    const hands = mix(skeleton.joints.handLeft, skeleton.joints.handRight, 0.5);
    const carried = root.carriedKg;
    const over = (skeleton.centreOfMass[0] * body.massKg + hands[0] * carried) / (body.massKg + carried);
    const error = over - root.overX;
    if (Math.abs(error) < 1e-5) break;
    x = Math.max(ankle[0] - furthest, Math.min(ankle[0] + furthest, x - error * 1.1));
    skeleton = solveAt(body, pose, hipsAt(x));
  }
  return skeleton;
}

/** True reach of a limb, for checks: both bones of the named leg in metres. */
export const legLengths = ({ joints: j }: Skeleton, side: 'Left' | 'Right'): [number, number] => [
  distance(j[`hip${side}`], j[`knee${side}`]),
  distance(j[`knee${side}`], j[`ankle${side}`]),
];
