import { libraryLift } from '../library';

/** Content as a working coach would write it: common practice of the trade, no source. */
export const HOLLOW_HOLD = libraryLift(
  'hollow-hold',
  {
    name: 'Hollow hold',
    pattern: 'brace',
    tempo: null,
    brief: {
      views: ['side'],
      repsMin: 1,
      repsMax: 1,
      cameraHeightCm: 20,
      cameraDistanceCm: 250,
      inFrame: 'Fingers to toes, lying; turn the phone on its side',
      note: 'The phone stands on the floor. Hold for ten seconds.',
    },
  },
  [
    [
      'Low back leaves the floor',
      'throughout',
      'side',
      'Crush a grape under your belt',
      'Dead bug, five slow breaths a side',
      'low-back-lifts',
    ],
    [
      'Knees bend',
      'throughout',
      'side',
      'Reach the far wall with your toes',
      'Hold with a folded towel between the knees',
      'knees-bend',
    ],
    [
      'Legs held too high',
      'throughout',
      'side',
      'Let the heels skim the grass',
      'Lower the legs by one hand each set while the back stays down',
      'legs-too-high',
    ],
    [
      'Arms come forward',
      'throughout',
      'side',
      'Stretch a rope from fingers to toes',
      'Hold with the hands on a light stick overhead',
      'arms-drop',
    ],
    [
      'Chin pokes to the chest',
      'throughout',
      'side',
      'Hold an orange under your chin',
      'Head nods lying down, ten slow',
      'chin-pokes',
    ],
    [
      'Holds the breath',
      'throughout',
      'either',
      'Whisper the seconds',
      'Short holds: out for four, in for two',
      undefined,
    ],
  ],
  [
    ['easier', 'Tuck hold', 'Knees over the hips, arms beside the ears'],
    ['easier', 'Dead bug', 'One arm and the other leg, slow'],
    ['same', 'One leg bent', 'Change legs halfway'],
    ['harder', 'Hollow rocks', 'Small rocks, the shape does not change'],
  ],
);
