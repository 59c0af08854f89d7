/** Frames a second as an exact ratio, for instance 30000/1001. */
export interface FrameRate {
  readonly num: number;
  readonly den: number;
}

/** The instant at which frame `n` (from 0) begins, to the whole ms. */
export function frameStartMs(n: number, fps: FrameRate): number {
  return Math.round((n * 1000 * fps.den) / fps.num);
}

/** The frame shown at an instant given in whole ms; the inverse of {@link frameStartMs} up to 500 frames a second. */
export function frameAtMs(ms: number, fps: FrameRate): number {
  // A whole ms stands for all that rounds to it, so its upper end decides.
  return Math.max(0, Math.floor(((ms + 0.5) * fps.num) / (1000 * fps.den) + 1e-9));
}

/**
 * Seconds to seek to for frame `n`: its middle. A time on the border between two frames shows one or the other,
 * as the browser rounds.
 */
export function seekSeconds(n: number, fps: FrameRate): number {
  return ((n + 0.5) * fps.den) / fps.num;
}

/** The frame whose presentation time the browser reports, seconds. */
export function frameOfMediaTime(mediaTime: number, fps: FrameRate): number {
  return Math.round((mediaTime * fps.num) / fps.den);
}
