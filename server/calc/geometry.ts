/** A point as fractions of the displayed (upright) frame, origin top left. */
export type FramePoint = readonly [number, number];

/** The displayed size of the clip, pixels. */
export interface FrameSize {
  readonly width: number;
  readonly height: number;
}

export type MeasureKind = 'angle' | 'lean' | 'depth';

/** Degrees, or why there is no number. `plusMinus` is the half-width of the 95 % limits. */
export type Measured =
  | { readonly ok: true; readonly value: number; readonly plusMinus: number }
  | { readonly ok: false; readonly reason: 'points-coincide' | 'wrong-number-of-points' | 'no-size' };

/**
 * Standard deviation with which a coach places a point, pixels of the displayed clip along each axis.
 * Common practice, no source.
 */
export const PLACING_ERROR_PX = 3;

/** Points closer than this are the same point, pixels: a line through them has no direction. */
const SAME_POINT_PX = 0.5;
const Z95 = 1.959963984540054;
const DEGREES = 180 / Math.PI;

interface Pixel {
  readonly x: number;
  readonly y: number;
}

const measured = (value: number, sdRadians: number): Measured => ({
  ok: true,
  value,
  plusMinus: Math.min(180, Z95 * sdRadians * DEGREES),
});
const coincide: Measured = { ok: false, reason: 'points-coincide' };
const distance = (p: Pixel, q: Pixel) => Math.hypot(p.x - q.x, p.y - q.y);

function jointAngle(a: Pixel, vertex: Pixel, c: Pixel, sigma: number): Measured {
  const first = distance(a, vertex);
  const second = distance(c, vertex);
  if (first < SAME_POINT_PX || second < SAME_POINT_PX) return coincide;
  const u = { x: a.x - vertex.x, y: a.y - vertex.y };
  const v = { x: c.x - vertex.x, y: c.y - vertex.y };
  // atan2 keeps its accuracy near 0° and 180°, where an arc cosine loses it.
  const value = Math.abs(Math.atan2(u.x * v.y - u.y * v.x, u.x * v.x + u.y * v.y)) * DEGREES;
  // First order: each end turns its arm by 1/length, the vertex both arms at once, together |AC| / (|BA| |BC|).
  const sd = sigma * Math.hypot(1 / first, 1 / second, distance(a, c) / (first * second));
  return measured(value, sd);
}

function lean(lower: Pixel, upper: Pixel, sigma: number): Measured {
  const length = distance(lower, upper);
  if (length < SAME_POINT_PX) return coincide;
  // Adding 0 turns -0 into 0, so that straight down is 180 and never -180.
  const value = Math.atan2(upper.x - lower.x + 0, lower.y - upper.y) * DEGREES;
  return measured(value, (sigma * Math.SQRT2) / length);
}

function depth(hip: Pixel, knee: Pixel, sigma: number): Measured {
  const length = distance(hip, knee);
  if (length < SAME_POINT_PX) return coincide;
  const value = Math.atan2(hip.y - knee.y, Math.abs(knee.x - hip.x)) * DEGREES;
  return measured(value, (sigma * Math.SQRT2) / length);
}

/**
 * A measure from points on a frame. Fractions are multiplied by the displayed size first: on a frame that is not
 * square, the angle of the fractions is another angle.
 *
 * - `angle`: three points, the vertex second; the included angle, 0 to 180.
 * - `lean`: lower point, then upper; 0 upright, positive toward the right of the frame, -180 to 180.
 * - `depth`: hip crease, then top of the knee; the thigh's angle below (positive: the hip is lower than the knee)
 *   or above (negative) horizontal, -90 to 90. Level is not below (IPF Technical Rules: "lower than").
 *
 * The ± follows from an independent error of `sigmaPx` along each axis of each point, to first order.
 */
export function measure(
  kind: MeasureKind,
  points: readonly FramePoint[],
  size: FrameSize,
  sigmaPx = PLACING_ERROR_PX,
): Measured {
  if (!(size.width > 0 && size.height > 0)) return { ok: false, reason: 'no-size' };
  const [first, second, third] = points.map(([x, y]) => ({ x: x * size.width, y: y * size.height }));
  if (!first || !second || points.length !== (kind === 'angle' ? 3 : 2)) {
    return { ok: false, reason: 'wrong-number-of-points' };
  }
  if (kind === 'lean') return lean(first, second, sigmaPx);
  if (kind === 'depth') return depth(first, second, sigmaPx);
  return third ? jointAngle(first, second, third, sigmaPx) : { ok: false, reason: 'wrong-number-of-points' };
}
