/**
 * Segment lengths as fractions of body height: the table of Drillis and Contini (1966) as printed in Winter,
 * *Biomechanics and Motor Control of Human Movement* (figure 4.1 of the 4th edition). Quoted from memory.
 */
export const SEGMENT = {
  footLength: 0.152,
  ankleHeight: 0.039,
  kneeHeight: 0.285,
  hipHeight: 0.53,
  shoulderHeight: 0.818,
  chinHeight: 0.87,
  eyeHeight: 0.936,
  hipWidth: 0.191,
  shoulderWidth: 0.259,
  upperArm: 0.186,
  forearm: 0.146,
  hand: 0.108,
  footBreadth: 0.055,
} as const;

/** Share of body mass and centre of mass from the near end, one segment each (Winter, table 4.1; from memory). */
export const MASS = {
  foot: { share: 0.0145, centre: 0.5 },
  shank: { share: 0.0465, centre: 0.433 },
  thigh: { share: 0.1, centre: 0.433 },
  hand: { share: 0.006, centre: 0.506 },
  forearm: { share: 0.016, centre: 0.43 },
  upperArm: { share: 0.028, centre: 0.436 },
  trunk: { share: 0.497, centre: 0.5 },
  head: { share: 0.081, centre: 0.5 },
} as const;

export const BUILD_IDS = ['even', 'slight', 'broad', 'sturdy', 'tall', 'compact'] as const;
export type BuildId = (typeof BUILD_IDS)[number];

/** A build: height, mass and how far widths and girths depart from the drawn average (composed, no source). */
export interface Build {
  heightM: number;
  massKg: number;
  shoulders: number;
  hips: number;
  waist: number;
  chest: number;
  limbs: number;
  bust: number;
}

const BUILDS: Record<BuildId, Build> = {
  even: { heightM: 1.74, massKg: 72, shoulders: 1, hips: 1, waist: 1, chest: 1, limbs: 1, bust: 0 },
  slight: {
    heightM: 1.66,
    massKg: 58,
    shoulders: 0.9,
    hips: 1.03,
    waist: 0.86,
    chest: 0.9,
    limbs: 0.9,
    bust: 0.8,
  },
  broad: {
    heightM: 1.82,
    massKg: 90,
    shoulders: 1.1,
    hips: 0.99,
    waist: 1.02,
    chest: 1.12,
    limbs: 1.13,
    bust: 0,
  },
  sturdy: {
    heightM: 1.71,
    massKg: 86,
    shoulders: 1.03,
    hips: 1.13,
    waist: 1.24,
    chest: 1.12,
    limbs: 1.13,
    bust: 0.2,
  },
  tall: {
    heightM: 1.9,
    massKg: 82,
    shoulders: 1.02,
    hips: 0.95,
    waist: 0.93,
    chest: 0.97,
    limbs: 0.95,
    bust: 0,
  },
  compact: {
    heightM: 1.62,
    massKg: 64,
    shoulders: 0.96,
    hips: 1.09,
    waist: 0.95,
    chest: 0.97,
    limbs: 1.04,
    bust: 1,
  },
};

/** Lengths in metres of one body. */
export interface Body extends Build {
  thigh: number;
  shank: number;
  upperArm: number;
  forearm: number;
  hand: number;
  footLength: number;
  ankleHeight: number;
  /** Half the distance between the hip joints. */
  hipHalf: number;
  /** Half the distance between the shoulder joints. */
  shoulderHalf: number;
  /** Mid-hip to the line of the shoulders, straight. */
  trunk: number;
  /** Shoulder line to the base of the skull, and from there to the crown. */
  neck: number;
  head: number;
}

/** The body of a build, from Winter's fractions. */
export function bodyOf(id: BuildId): Body {
  const build = BUILDS[id];
  const h = build.heightM;
  return {
    ...build,
    thigh: (SEGMENT.hipHeight - SEGMENT.kneeHeight) * h,
    shank: (SEGMENT.kneeHeight - SEGMENT.ankleHeight) * h,
    upperArm: SEGMENT.upperArm * h,
    forearm: SEGMENT.forearm * h,
    hand: SEGMENT.hand * h,
    footLength: SEGMENT.footLength * h,
    ankleHeight: SEGMENT.ankleHeight * h,
    // Joint centres lie inside the outer widths Winter gives (trochanters, acromia).
    hipHalf: SEGMENT.hipWidth * 0.5 * 0.56 * h * build.hips,
    shoulderHalf: SEGMENT.shoulderWidth * 0.5 * 0.9 * h * build.shoulders,
    trunk: (SEGMENT.shoulderHeight - SEGMENT.hipHeight) * h,
    neck: (SEGMENT.chinHeight - SEGMENT.shoulderHeight) * h,
    head: (1 - SEGMENT.chinHeight) * h,
  };
}
