import type { AngleName } from './angles';
import type { LiftId } from './lift-ids';

/** A fault the figure can show. The dose runs from 0 (not there) to 1 (plain to see). */
export interface Fault {
  id: string;
  lift: LiftId;
  name: string;
  /** The angle of the truth file that the fault moves most plainly, and which way. */
  angle: AngleName;
  change: 'increases' | 'decreases';
  /** The view that shows it best. */
  view: 'front' | 'side';
}

const of = (
  lift: LiftId,
  rows: readonly (readonly [string, string, AngleName, '+' | '-', 'front' | 'side'])[],
): Fault[] =>
  rows.map(([id, name, angle, change, view]) => ({
    id,
    lift,
    name,
    angle,
    change: change === '+' ? 'increases' : 'decreases',
    view,
  }));

/** Every fault of every lift. At full dose the named angle moves by 10° or more at some instant; at 0 by nothing. */
export const FAULTS: readonly Fault[] = [
  ...of('swing', [
    ['squats-instead-of-hinging', 'Squats instead of hinging', 'kneeRight', '-', 'side'],
    ['bell-too-low', 'Bell drops below the knees', 'shoulderRight', '+', 'side'],
    ['arms-lift-early', 'Arms lift before the hips finish', 'elbowRight', '-', 'side'],
    ['ribs-flare', 'Ribs flare at the top', 'spineFlexion', '-', 'side'],
    ['leans-back', 'Leans back to finish', 'trunkLean', '-', 'side'],
    ['heels-lift', 'Heels leave the floor', 'footPitchRight', '+', 'side'],
    ['rounded-back', 'Rounds the low back', 'spineFlexion', '+', 'side'],
  ]),
  ...of('goblet-squat', [
    ['knees-fall-in', 'Knees fall in', 'kneeInRight', '+', 'front'],
    ['heels-lift', 'Heels leave the floor', 'footPitchRight', '+', 'side'],
    ['shallow-depth', 'Stops short of depth', 'kneeRight', '+', 'side'],
    ['rounded-back', 'Rounds the back', 'spineFlexion', '+', 'side'],
    ['chest-drops', 'Chest drops', 'trunkLean', '+', 'side'],
    ['hips-rise-first', 'Hips rise before the chest', 'trunkLean', '+', 'side'],
    ['bell-drifts-away', 'Bell drifts away from the chest', 'elbowRight', '+', 'side'],
  ]),
  ...of('floor-press', [
    ['elbow-flares', 'Elbow flares out', 'shoulderRight', '+', 'front'],
    ['short-range', 'Elbow stops short of the floor', 'elbowRight', '+', 'side'],
    ['press-drifts', 'Bell drifts towards the feet', 'shoulderRight', '-', 'side'],
    ['hips-lift', 'Hips leave the floor', 'trunkLean', '-', 'side'],
    ['soft-lockout', 'Elbow stays bent at the top', 'elbowRight', '-', 'side'],
  ]),
  ...of('split-squat-hold', [
    ['knees-fall-in', 'Front knee falls in', 'kneeInRight', '+', 'front'],
    ['heels-lift', 'Front heel leaves the floor', 'footPitchRight', '+', 'side'],
    ['shallow-depth', 'Stops short of depth', 'kneeRight', '+', 'side'],
    ['leans-forward', 'Leans over the front leg', 'trunkLean', '+', 'side'],
    ['leans-sideways', 'Leans to one side', 'sideLean', '+', 'front'],
    ['ribs-flare', 'Ribs flare', 'spineFlexion', '-', 'side'],
  ]),
  ...of('bent-over-row', [
    ['torso-rises', 'Torso rises with the pull', 'trunkLean', '-', 'side'],
    ['rounded-back', 'Rounds the back', 'spineFlexion', '+', 'side'],
    ['uneven-pull', 'One side pulls first', 'barTilt', '+', 'front'],
    ['short-range', 'Bar stops short of the body', 'elbowRight', '+', 'side'],
    ['squats-instead-of-hinging', 'Squats instead of hinging', 'kneeRight', '-', 'side'],
  ]),
  ...of('hang-clean', [
    ['early-arm-pull', 'Arms pull before the hips finish', 'elbowRight', '-', 'side'],
    ['rounded-back', 'Rounds the back', 'spineFlexion', '+', 'side'],
    ['bar-swings-away', 'Bar swings away from the body', 'shoulderRight', '+', 'side'],
    ['elbows-low', 'Elbows stay low in the catch', 'shoulderRight', '-', 'side'],
    ['squats-instead-of-hinging', 'Squats instead of hinging', 'kneeRight', '-', 'side'],
    ['knees-fall-in', 'Knees fall in at the catch', 'kneeInRight', '+', 'front'],
    ['leans-back', 'Leans back in the pull', 'trunkLean', '-', 'side'],
  ]),
  ...of('push-press', [
    ['ribs-flare', 'Ribs flare overhead', 'spineFlexion', '-', 'side'],
    ['uneven-press', 'One side presses first', 'barTilt', '+', 'front'],
    ['leans-forward', 'Leans forward in the dip', 'trunkLean', '+', 'side'],
    ['early-arm-pull', 'Arms press before the legs finish', 'shoulderRight', '+', 'side'],
    ['heels-lift', 'Heels lift in the dip', 'footPitchRight', '+', 'side'],
    ['knees-fall-in', 'Knees fall in during the dip', 'kneeInRight', '+', 'front'],
    ['soft-lockout', 'Elbows stay bent overhead', 'elbowRight', '-', 'side'],
  ]),
  ...of('hollow-hold', [
    ['low-back-lifts', 'Low back leaves the floor', 'spineFlexion', '-', 'side'],
    ['knees-bend', 'Knees bend', 'kneeRight', '-', 'side'],
    ['legs-too-high', 'Legs held too high', 'hipRight', '-', 'side'],
    ['arms-drop', 'Arms come forward', 'shoulderRight', '-', 'side'],
    ['chin-pokes', 'Chin pokes to the chest', 'headPitch', '+', 'side'],
  ]),
];

/** The faults of one lift. */
export const faultsOf = (lift: LiftId): Fault[] => FAULTS.filter((fault) => fault.lift === lift);
