import { SIDES, type Side, type Skeleton } from './skeleton';
import { RIGHT, UP, type V3, along, mix, scale, squareTo, sub, unit } from './vec';

export const IMPLEMENT_KINDS = ['kettlebell', 'dumbbell', 'barbell', 'none'] as const;
export type ImplementKind = (typeof IMPLEMENT_KINDS)[number];

/** Something held: where its middle is, the way its bar or handle runs, and for a bell the way it hangs. */
export interface Implement {
  kind: Exclude<ImplementKind, 'none'>;
  /** Middle of the bar or the centre of the bell, metres. */
  at: V3;
  /** The grip, metres. */
  grip: V3;
  axis: V3;
  hang: V3;
}

/** Distance from the middle of a kettlebell's handle to the centre of its ball, metres; by load in kilograms. */
export const bellDrop = (kg: number): number => 0.065 + bellRadius(kg);
/** Radius of a kettlebell's ball: iron of 7.2 kg/dm³ with some hollow; composed to match common sizes. */
export const bellRadius = (kg: number): number => 0.037 * Math.cbrt(Math.max(4, kg));
export const plateRadius = (kg: number): number => (kg > 60 ? 0.185 : kg > 35 ? 0.155 : 0.13);

/** A bell whose handle is in both hands. */
export function bellInBothHands({ joints }: Skeleton, hang: V3, kg: number): Implement {
  const grip = mix(joints.handLeft, joints.handRight, 0.5);
  const down = unit(hang, [0, -1, 0]);
  return {
    kind: 'kettlebell',
    grip,
    at: along(grip, down, bellDrop(kg)),
    axis: squareTo(RIGHT, down),
    hang: down,
  };
}

/** A dumbbell in both hands, upright, held under its upper head. */
export function dumbbellInBothHands({ joints }: Skeleton, hang: V3): Implement {
  const grip = mix(joints.handLeft, joints.handRight, 0.5);
  const down = unit(hang, [0, -1, 0]);
  return { kind: 'dumbbell', grip, at: along(grip, down, 0.1), axis: down, hang: down };
}

/** A bell or dumbbell in one hand; it hangs from the grip by gravity or lies along `hang`. */
export function inOneHand(
  skeleton: Skeleton,
  side: Side,
  kind: 'kettlebell' | 'dumbbell',
  kg: number,
  axis: V3,
  hang: V3,
): Implement {
  const grip = skeleton.joints[side === 'left' ? 'handLeft' : 'handRight'];
  const down = unit(hang, scale(UP, -1));
  const at = kind === 'kettlebell' ? along(grip, down, bellDrop(kg)) : grip;
  return { kind, grip, at, axis: unit(axis, RIGHT), hang: down };
}

/** One implement in each hand. */
export const inEachHand = (
  skeleton: Skeleton,
  kind: 'kettlebell' | 'dumbbell',
  kg: number,
  axis: V3,
  hang: V3,
): Implement[] => SIDES.map((side) => inOneHand(skeleton, side, kind, kg, axis, hang));

/** A barbell through both hands. */
export function barInHands({ joints }: Skeleton): Implement {
  const grip = mix(joints.handLeft, joints.handRight, 0.5);
  const axis = unit(sub(joints.handRight, joints.handLeft), RIGHT);
  return { kind: 'barbell', grip, at: grip, axis, hang: [0, -1, 0] };
}
