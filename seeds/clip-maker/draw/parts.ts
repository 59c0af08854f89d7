/** Body parts, for shade that one part throws on another. */
export const PART = {
  pelvis: 0,
  torso: 1,
  head: 2,
  upperArmLeft: 3,
  upperArmRight: 4,
  forearmLeft: 5,
  forearmRight: 6,
  thighLeft: 7,
  thighRight: 8,
  shankLeft: 9,
  shankRight: 10,
  footLeft: 11,
  footRight: 12,
  implement: 13,
  prop: 14,
} as const;

const bit = (...parts: number[]): number => parts.reduce((mask, part) => mask | (1 << part), 0);

/** By part: the parts too close to throw shade on it, as bits. */
export const NEIGHBOURS: readonly number[] = [
  bit(PART.pelvis, PART.torso),
  bit(PART.torso, PART.pelvis, PART.head),
  bit(PART.head, PART.torso),
  bit(PART.upperArmLeft, PART.forearmLeft, PART.torso, PART.implement),
  bit(PART.upperArmRight, PART.forearmRight, PART.torso, PART.implement),
  bit(PART.forearmLeft, PART.upperArmLeft, PART.implement),
  bit(PART.forearmRight, PART.upperArmRight, PART.implement),
  bit(PART.thighLeft, PART.shankLeft, PART.pelvis, PART.footLeft),
  bit(PART.thighRight, PART.shankRight, PART.pelvis, PART.footRight),
  bit(PART.shankLeft, PART.thighLeft, PART.footLeft),
  bit(PART.shankRight, PART.thighRight, PART.footRight),
  bit(PART.footLeft, PART.shankLeft),
  bit(PART.footRight, PART.shankRight),
  bit(PART.implement, PART.forearmLeft, PART.forearmRight),
  bit(PART.prop),
];
