/** A point or direction in metres: x the way the figure faces, y up, z to the figure's right. */
export type V3 = readonly [number, number, number];

export const UP: V3 = [0, 1, 0];
export const FORWARD: V3 = [1, 0, 0];
export const RIGHT: V3 = [0, 0, 1];

export const add = (a: V3, b: V3): V3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const sub = (a: V3, b: V3): V3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: V3, s: number): V3 => [a[0] * s, a[1] * s, a[2] * s];
/** a + b·s */
export const along = (a: V3, b: V3, s: number): V3 => [a[0] + b[0] * s, a[1] + b[1] * s, a[2] + b[2] * s];
export const dot = (a: V3, b: V3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: V3, b: V3): V3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const length = (a: V3): number => Math.hypot(a[0], a[1], a[2]);
export const distance = (a: V3, b: V3): number => length(sub(a, b));
export const mix = (a: V3, b: V3, s: number): V3 => [
  a[0] + (b[0] - a[0]) * s,
  a[1] + (b[1] - a[1]) * s,
  a[2] + (b[2] - a[2]) * s,
];

/** The direction of a at length 1; `fallback` when a has no direction. */
export function unit(a: V3, fallback: V3 = UP): V3 {
  const l = length(a);
  return l < 1e-9 ? fallback : scale(a, 1 / l);
}

/** The part of a that is square to the unit vector n, at length 1. */
export const squareTo = (a: V3, n: V3, fallback: V3 = FORWARD): V3 => unit(along(a, n, -dot(a, n)), fallback);

export const radians = (degrees: number): number => (degrees * Math.PI) / 180;
export const degrees = (rad: number): number => (rad * 180) / Math.PI;

/** Turns a about the unit axis n by an angle in degrees, right-handed. */
export function turn(a: V3, n: V3, angle: number): V3 {
  const c = Math.cos(radians(angle));
  const s = Math.sin(radians(angle));
  const k = cross(n, a);
  const d = dot(n, a) * (1 - c);
  return [a[0] * c + k[0] * s + n[0] * d, a[1] * c + k[1] * s + n[1] * d, a[2] * c + k[2] * s + n[2] * d];
}

/** A sagittal direction: 0° is up, 90° forward, 180° down. */
export const sagittal = (angle: number): V3 => [Math.sin(radians(angle)), Math.cos(radians(angle)), 0];

/** The angle at b between a and c in degrees, 0 to 180. */
export function angleAt(a: V3, b: V3, c: V3): number {
  const u = unit(sub(a, b));
  const w = unit(sub(c, b));
  return degrees(Math.acos(Math.max(-1, Math.min(1, dot(u, w)))));
}
