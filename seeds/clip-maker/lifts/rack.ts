import type { V3 } from '../vec';

/** Where the wrists are when the bar lies on the front of the shoulders; fractions of height, from mid-shoulder. */
export const RACK = { forward: 0.092, up: -0.042 };
export const RACK_POLE = (out: V3): V3 => [1, -0.55, out[2] * 0.35];
export const RACK_HAND = (out: V3): V3 => [-0.25, 1, out[2] * 0.1];
