import type { AngleName } from '../angles';
import type { Body } from '../anthropometry';
import { lerp, minJerk } from '../easing';
import type { Implement, ImplementKind } from '../implements';
import type { LiftId } from '../lift-ids';
import type { View } from '../options';
import type { ArmPose, FootPlace, LegPose, Pose, Side, Skeleton, Torso } from '../skeleton';
import { sign } from '../skeleton';
import type { PhaseKind, Tempo } from '../timeline';
import { type V3, add, along, scale } from '../vec';

/** One instant of a set, as a lift's pose function sees it. */
export interface Moment {
  body: Body;
  kind: PhaseKind;
  /** Through the phase, 0 to 1. */
  s: number;
  rep: number;
  /** Share of the lift's full range asked for. */
  depth: number;
  loadKg: number;
  implement: ImplementKind;
  /** The dose of a fault, 0 to 1. */
  dose: (faultId: string) => number;
  /** Slow wandering of a living body, −1 to 1, in three independent channels. */
  drift: readonly [number, number, number];
}

export interface CameraPlace {
  /** About the vertical from straight ahead of the figure, degrees; 90 is its right side. */
  azimuthDeg: number;
  heightM: number;
  /** Downward tilt, degrees. */
  tiltDeg: number;
}

export interface LiftModel {
  id: LiftId;
  name: string;
  first: 'down' | 'up';
  reps: number;
  tempo: Tempo;
  leadOutMs: number;
  implement: ImplementKind;
  loadKg: number;
  /** The angle that carries the rep, its name in the truth file. */
  primaryAngle: AngleName;
  camera: Record<View, CameraPlace>;
  pose: (m: Moment) => Pose;
  held: (skeleton: Skeleton, m: Moment) => Implement[];
}

export const STANDING: Record<View, CameraPlace> = {
  front: { azimuthDeg: 0, heightM: 0.98, tiltDeg: 0 },
  side: { azimuthDeg: 90, heightM: 0.98, tiltDeg: 0 },
};

/** A figure on the floor is filmed from its head end, from chair height, so that nothing hides the arms. */
export const LYING: Record<View, CameraPlace> = {
  front: { azimuthDeg: 180, heightM: 1.35, tiltDeg: 17 },
  side: { azimuthDeg: 90, heightM: 0.8, tiltDeg: 4 },
};

/** How far down a plain lowering and lifting is, 0 top to 1 bottom, by minimum jerk. */
export function lowered(m: Moment, first: 'down' | 'up'): number {
  switch (m.kind) {
    case 'down':
      return minJerk(m.s);
    case 'pause-bottom':
      return 1;
    case 'up':
      return 1 - minJerk(m.s);
    case 'pause-top':
      return 0;
    case 'lead-in':
    case 'lead-out':
      return first === 'down' ? 0 : 1;
  }
}

/** Both feet side by side, `width` metres apart. */
export function stance(
  width: number,
  toeOut: number,
  heelLift: number,
  kneeIn: number,
): Record<Side, LegPose> {
  const foot = (side: Side): FootPlace => ({ x: 0, z: (width / 2) * sign(side), toeOut, heelLift });
  return {
    left: { kind: 'planted', foot: foot('left'), kneeIn },
    right: { kind: 'planted', foot: foot('right'), kneeIn },
  };
}

/** Both arms by one rule, mirrored: `place` gives the right arm with z positive outward from the middle. */
export function bothArms(place: (side: Side, out: V3) => ArmPose): Record<Side, ArmPose> {
  return { left: place('left', [0, 0, -1]), right: place('right', [0, 0, 1]) };
}

/** A point from the middle of the shoulders: forward, up and sideways in the world, metres. */
export const fromShoulders = (torso: Torso, forward: number, up: number, out: V3, wide: number): V3 =>
  along(add(torso.midShoulder, [forward, up, 0]), out, wide);

/** A point from the middle of the shoulders along the chest's own directions, metres. */
export const fromChest = (torso: Torso, forward: number, up: number, out: V3, wide: number): V3 =>
  along(along(along(torso.midShoulder, torso.chestFront, forward), torso.chestUp, up), out, wide);

export const blend = (a: V3, b: V3, s: number): V3 => add(scale(a, 1 - s), scale(b, s));
export { lerp };
