import { BENT_OVER_ROW } from './bent-over-row';
import { FLOOR_PRESS } from './floor-press';
import { GOBLET_SQUAT } from './goblet-squat';
import { HANG_CLEAN } from './hang-clean';
import { HOLLOW_HOLD } from './hollow-hold';
import { PUSH_PRESS } from './push-press';
import { SPLIT_SQUAT_HOLD } from './split-squat-hold';
import { SWING } from './swing';
import type { LibraryLift } from '../library';

/** The demo's library, in the order in which it is written. */
export const LIBRARY: readonly LibraryLift[] = [
  SWING,
  GOBLET_SQUAT,
  SPLIT_SQUAT_HOLD,
  HOLLOW_HOLD,
  FLOOR_PRESS,
  BENT_OVER_ROW,
  HANG_CLEAN,
  PUSH_PRESS,
];
