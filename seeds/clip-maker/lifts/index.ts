import type { LiftId } from '../lift-ids';
import { bentOverRow } from './bent-over-row';
import { floorPress } from './floor-press';
import { gobletSquat } from './goblet-squat';
import { hangClean } from './hang-clean';
import { hollowHold } from './hollow-hold';
import type { LiftModel } from './lift';
import { pushPress } from './push-press';
import { splitSquatHold } from './split-squat-hold';
import { swing } from './swing';

/** The eight lifts by id. */
export const LIFTS: Record<LiftId, LiftModel> = {
  swing,
  'goblet-squat': gobletSquat,
  'floor-press': floorPress,
  'split-squat-hold': splitSquatHold,
  'bent-over-row': bentOverRow,
  'hang-clean': hangClean,
  'push-press': pushPress,
  'hollow-hold': hollowHold,
};
export type { LiftModel, Moment } from './lift';
