export const LIFT_IDS = [
  'swing',
  'goblet-squat',
  'floor-press',
  'split-squat-hold',
  'bent-over-row',
  'hang-clean',
  'push-press',
  'hollow-hold',
] as const;
export type LiftId = (typeof LIFT_IDS)[number];
