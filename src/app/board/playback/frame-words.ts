import { frameAtMs, type FrameRate } from '@calc/frames';
import { clipTime } from '../../shared/times/time-words';

/** An instant of a clip with the frame it shows: `0:02.917 · frame 175`. */
export function frameWords(clipMs: number, fps: FrameRate): string {
  return `${clipTime(clipMs, 3)} · frame ${frameAtMs(Math.round(clipMs), fps)}`;
}

/** The same for a screen reader: `2.917 seconds, frame 175`. */
export function frameSpoken(clipMs: number, fps: FrameRate): string {
  return `${(Math.round(clipMs) / 1000).toFixed(3)} seconds, frame ${frameAtMs(Math.round(clipMs), fps)}`;
}

const SPEED_WORDS = new Map<number, string>([
  [0.1, 'tenth speed'],
  [0.25, 'quarter speed'],
  [0.5, 'half speed'],
  [1, 'full speed'],
]);

/** A speed in words: `half speed`. */
export function speedWords(speed: number): string {
  return SPEED_WORDS.get(speed) ?? `${speed} × speed`;
}
