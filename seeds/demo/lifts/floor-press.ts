import { libraryLift } from '../library';

/** Content as a working coach would write it: common practice of the trade, no source. */
export const FLOOR_PRESS = libraryLift(
  'floor-press',
  {
    name: 'Single-arm floor press',
    pattern: 'press',
    tempo: '2110',
    brief: {
      views: ['front', 'side'],
      repsMin: 2,
      repsMax: 3,
      cameraHeightCm: 40,
      cameraDistanceCm: 250,
      inFrame: 'Head, hips and the bell at the top; turn the phone on its side',
      note: 'Front means from the feet; keep the soles in the picture.',
    },
  },
  [
    [
      'Elbow flares out',
      'down',
      'front',
      'Slide the elbow towards your pocket',
      'Press with a rolled towel under the arm',
      'elbow-flares',
    ],
    [
      'Elbow stops short of the floor',
      'bottom',
      'side',
      'Kiss the floor with the elbow, then go',
      'Press from a dead stop, one second on the floor',
      'short-range',
    ],
    [
      'Bell drifts towards the feet',
      'up',
      'side',
      'Draw a straight line to the lamp',
      'Press with a shoe balanced on the fist, no bell',
      'press-drifts',
    ],
    [
      'Hips leave the floor',
      'up',
      'side',
      'Nail your belt to the floor',
      'Glute bridge hold while you press with half the load',
      'hips-lift',
    ],
    [
      'Elbow stays bent at the top',
      'top',
      'side',
      'Reach until the sleeve moves',
      'Hold the top for three seconds, shoulder packed',
      'soft-lockout',
    ],
    [
      'Wrist folds back',
      'throughout',
      'side',
      'Knock on the ceiling',
      'Bottoms-up hold with a light bell, ten seconds',
      undefined,
    ],
  ],
  [
    ['easier', 'Two hands on one bell', 'The same reps, slower'],
    ['easier', 'Knee push-up', 'Hands under the shoulders, five seconds down'],
    ['same', 'Floor press with the lighter bell', 'Add two reps'],
    ['harder', 'Floor press with straight legs', 'Legs together, heels down'],
  ],
);
