import type { Implement } from './implements';
import { SIDES, type Skeleton, sign } from './skeleton';
import { RIGHT, angleAt, degrees, dot, sub } from './vec';

type SidedAngle = 'knee' | 'hip' | 'elbow' | 'shoulder' | 'ankle' | 'footPitch' | 'kneeIn';

/**
 * Angles of the truth file, degrees, true in space (not as seen). `knee`, `hip`, `elbow`, `shoulder` and `ankle` are
 * the angle at the joint between its neighbours, 180 straight; `shoulder` lies between trunk and upper arm, 0 hanging.
 * `footPitch` is 0 flat, positive with the heel up. `kneeIn` is the lean of the shank in the frontal plane, positive
 * with the knee inside the ankle. `trunkLean`, `headPitch` and `sideLean` are from upright, forward
 * and right positive. `spineFlexion` is chest against pelvis, positive rounded. `barTilt` is the bar's slope, positive
 * with the right end low.
 */
export type AngleName =
  `${SidedAngle}${'Left' | 'Right'}` | 'trunkLean' | 'sideLean' | 'spineFlexion' | 'headPitch' | 'barTilt';

export type Angles = Record<AngleName, number>;

/** Lean of a direction from upright in the sagittal plane, forward positive, −180 to 180. */
const leanOf = (x: number, y: number): number => degrees(Math.atan2(x, y));

/** Every angle of one instant, degrees. */
export function anglesOf(skeleton: Skeleton, held: readonly Implement[]): Angles {
  const j = skeleton.joints;
  const spine = sub(skeleton.torso.midShoulder, skeleton.torso.midHip);
  const { pelvisUp, pelvisFront, chestUp } = skeleton.torso;
  const bar = held.find((item) => item.kind === 'barbell');
  const angles: Partial<Angles> = {
    trunkLean: leanOf(spine[0], spine[1]),
    sideLean: degrees(Math.atan2(spine[2], Math.hypot(spine[0], spine[1]))),
    spineFlexion: degrees(Math.atan2(dot(chestUp, pelvisFront), dot(chestUp, pelvisUp))),
    headPitch: leanOf(skeleton.head.up[0], skeleton.head.up[1]),
    barTilt: bar ? degrees(Math.asin(-bar.axis[1])) * (dot(bar.axis, RIGHT) < 0 ? -1 : 1) : 0,
  };
  for (const side of SIDES) {
    const n = side === 'left' ? 'Left' : 'Right';
    const hip = j[`hip${n}`];
    const knee = j[`knee${n}`];
    const ankle = j[`ankle${n}`];
    const shoulder = j[`shoulder${n}`];
    const foot = sub(j[`ball${n}`], j[`heel${n}`]);
    const inward = Math.atan2((ankle[2] - knee[2]) * sign(side), knee[1] - ankle[1]);
    angles[`knee${n}`] = angleAt(hip, knee, ankle);
    angles[`hip${n}`] = angleAt(shoulder, hip, knee);
    angles[`elbow${n}`] = angleAt(shoulder, j[`elbow${n}`], j[`wrist${n}`]);
    angles[`shoulder${n}`] = angleAt(hip, shoulder, j[`elbow${n}`]);
    angles[`ankle${n}`] = angleAt(knee, ankle, j[`toe${n}`]);
    angles[`footPitch${n}`] = -degrees(Math.asin(Math.max(-1, Math.min(1, foot[1] / Math.hypot(...foot)))));
    angles[`kneeIn${n}`] = degrees(inward);
  }
  return angles as Angles;
}
