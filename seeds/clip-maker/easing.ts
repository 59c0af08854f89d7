export const clamp01 = (x: number): number => Math.max(0, Math.min(1, x));
export const lerp = (a: number, b: number, s: number): number => a + (b - a) * s;

/** Minimum-jerk progress 0→1 (Flash and Hogan 1985, from memory): starts and ends without speed or acceleration. */
export function minJerk(s: number): number {
  const x = clamp01(s);
  return x * x * x * (10 - 15 * x + 6 * x * x);
}

/** Minimum-jerk progress inside the window [from, to] of a phase. */
export const during = (s: number, from: number, to: number): number => minJerk((s - from) / (to - from));

/** 0 outside [from, to], 1 in its middle, smooth. */
export function bump(s: number, from: number, to: number): number {
  if (s <= from || s >= to) return 0;
  return Math.sin((Math.PI * (s - from)) / (to - from)) ** 2;
}

/** A smooth curve through (at, value) points; flat at both ends. `keys` ascend in `at`. */
export function track(s: number, keys: readonly (readonly [number, number])[]): number {
  let before = keys[0] ?? ([0, 0] as const);
  if (s <= before[0]) return before[1];
  for (const key of keys) {
    if (s < key[0]) return lerp(before[1], key[1], minJerk((s - before[0]) / (key[0] - before[0])));
    before = key;
  }
  return before[1];
}
