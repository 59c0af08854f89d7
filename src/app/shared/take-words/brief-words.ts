import type { LiftDto } from '@contract';
import type { PhoneHeight } from '../brief-figure/brief-figure';

type Brief = LiftDto['brief'];

/** The height of the phone as people say it: under 60 cm the knee, under 115 cm the hip. Common practice, no source. */
export function phoneHeight(cameraHeightCm: number): PhoneHeight {
  if (cameraHeightCm < 60) return 'knee';
  return cameraHeightCm < 115 ? 'hip' : 'chest';
}

/** The distance from phone to lifter in metres, to the nearest half. */
export function distanceM(cameraDistanceCm: number): number {
  return Math.max(0.5, Math.round(cameraDistanceCm / 50) / 2);
}

/** How to set the phone down: `phone at hip height, 3 m away`. */
export function phoneWords(brief: Brief): string {
  return `phone at ${phoneHeight(brief.cameraHeightCm)} height, ${distanceM(brief.cameraDistanceCm)} m away`;
}

/** How many reps to show: `2 or 3 reps`, `2 to 5 reps`, `1 rep`. */
export function repsWords({ repsMin, repsMax }: Pick<Brief, 'repsMin' | 'repsMax'>): string {
  if (repsMin === repsMax) return repsMin === 1 ? '1 rep' : `${repsMin} reps`;
  return `${repsMin} ${repsMax === repsMin + 1 ? 'or' : 'to'} ${repsMax} reps`;
}
