import { libraryLift } from '../library';

/** Content as a working coach would write it: common practice of the trade, no source. */
export const PUSH_PRESS = libraryLift(
  'push-press',
  {
    name: 'Push press',
    pattern: 'press',
    tempo: null,
    brief: {
      views: ['front', 'side'],
      repsMin: 2,
      repsMax: 3,
      cameraHeightCm: 100,
      cameraDistanceCm: 350,
      inFrame: 'Feet, and the hands at the top',
      note: 'Step back until the bar overhead stays in the picture.',
    },
  },
  [
    [
      'Ribs flare overhead',
      'top',
      'side',
      'Zip the jacket up before the bar passes your face',
      'Half-kneeling press, one arm, breathing out',
      'ribs-flare',
    ],
    [
      'One side presses first',
      'up',
      'front',
      'Lift the tray level',
      'Pause at the forehead for one second',
      'uneven-press',
    ],
    [
      'Leans forward in the dip',
      'down',
      'side',
      'Slide your back down a wall',
      'Dip and hold with your back to a wall, five times',
      'leans-forward',
    ],
    [
      'Arms press before the legs finish',
      'up',
      'side',
      'Let the legs throw it; the arms only steer',
      'Dip and jump without pressing, five times',
      'early-arm-pull',
    ],
    [
      'Heels lift in the dip',
      'down',
      'side',
      'Leave two full footprints in the dip',
      'Dip on a flat plank, two-second stop',
      'heels-lift',
    ],
    [
      'Knees fall in during the dip',
      'down',
      'front',
      'Spread the floor as you dip',
      'Dips with a band around the knees',
      'knees-fall-in',
    ],
    [
      'Elbows stay bent overhead',
      'top',
      'side',
      'Push the ceiling away and listen for the click',
      'Hold the finish for three seconds every rep',
      'soft-lockout',
    ],
  ],
  [
    ['easier', 'Half-kneeling press', 'One arm, the lighter bell'],
    ['easier', 'Landmine press', 'Both arms, slow down'],
    ['same', 'Push press from the rack with a pause', 'Two seconds in the dip'],
    ['harder', 'Push press with a three-second lowering', 'The same load'],
  ],
);
