import { libraryLift } from '../library';

/** Content as a working coach would write it: common practice of the trade, no source. */
export const BENT_OVER_ROW = libraryLift(
  'bent-over-row',
  {
    name: 'Bent-over row',
    pattern: 'pull',
    tempo: '2011',
    brief: {
      views: ['front', 'side'],
      repsMin: 2,
      repsMax: 4,
      cameraHeightCm: 80,
      cameraDistanceCm: 300,
      inFrame: 'Head, feet and the bar at its lowest',
      note: '',
    },
  },
  [
    [
      'Torso rises with the pull',
      'up',
      'side',
      'Keep the tabletop level while the bar comes to it',
      'Rows with the forehead on the back of a chair',
      'torso-rises',
    ],
    [
      'Rounds the back',
      'bottom',
      'side',
      'Make a shelf of your back',
      'Broomstick along the back, hinge and hold ten seconds',
      'rounded-back',
    ],
    [
      'One side pulls first',
      'up',
      'front',
      'Lift a full tray: spill nothing',
      'Row with a one-second stop against the body',
      'uneven-pull',
    ],
    [
      'Bar stops short of the body',
      'top',
      'side',
      'Ring the bell at your belly button',
      'Row with the lighter bar and a two-second hold',
      'short-range',
    ],
    [
      'Squats instead of hinging',
      'set-up',
      'side',
      'Push the hips to the wall behind, knees soft',
      'Hinge with a wall at your back, then take the bar',
      'squats-instead-of-hinging',
    ],
    [
      'Shrugs the shoulders up',
      'top',
      'front',
      'Long neck: let the earrings hang',
      'Scapular rows, arms straight, ten slow',
      undefined,
    ],
  ],
  [
    ['easier', 'Row with the chest on a bench', 'The same load, no swing possible'],
    ['easier', 'Single-arm row on a chair', 'One hand on the chair, both sides'],
    ['same', 'Row from the floor', 'Put the bar down between reps'],
    ['harder', 'Row with a three-second lowering', 'The same load'],
  ],
);
