import { libraryLift } from '../library';

/** Content as a working coach would write it: common practice of the trade, no source. */
export const HANG_CLEAN = libraryLift(
  'hang-clean',
  {
    name: 'Hang clean',
    pattern: 'pull',
    tempo: null,
    brief: {
      views: ['front', 'side'],
      repsMin: 2,
      repsMax: 3,
      cameraHeightCm: 90,
      cameraDistanceCm: 400,
      inFrame: 'Head, feet and both ends of the bar',
      note: 'Slow motion helps here if your phone has it.',
    },
  },
  [
    [
      'Arms pull before the hips finish',
      'up',
      'side',
      'Ropes for arms until you are as tall as you get',
      'Clean pull to tall, three reps, arms straight',
      'early-arm-pull',
    ],
    [
      'Rounds the back',
      'bottom',
      'side',
      'Show the print on your shirt over the bar',
      'Pause at the knee for two seconds each rep',
      'rounded-back',
    ],
    [
      'Bar swings away from the body',
      'up',
      'side',
      'Paint your shirt with the bar',
      'Muscle clean close to a wall, an empty bar',
      'bar-swings-away',
    ],
    [
      'Elbows stay low in the catch',
      'top',
      'side',
      'Point the elbows at the far wall before the bar lands',
      'Front-rack hold, thirty seconds, breathing',
      'elbows-low',
    ],
    [
      'Squats instead of hinging',
      'down',
      'side',
      'Slide the bar down the thighs; shins stay quiet',
      'Romanian deadlift to the knee, five slow',
      'squats-instead-of-hinging',
    ],
    [
      'Knees fall in at the catch',
      'bottom',
      'front',
      'Land on rails',
      'Drop to the catch without a bar, stick it three times',
      'knees-fall-in',
    ],
    [
      'Leans back in the pull',
      'up',
      'side',
      'Jump straight up the pole',
      'Jump shrug with the bar, land in the same prints',
      'leans-back',
    ],
  ],
  [
    ['easier', 'Clean pull', 'No catch: tall and down again'],
    ['easier', 'Kettlebell clean', 'One arm, the lighter bell'],
    ['same', 'Hang clean from the high thigh', 'A shorter way, the same load'],
    ['harder', 'Clean from below the knee', 'Only with a flat back'],
  ],
);
