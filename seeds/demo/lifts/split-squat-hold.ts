import { libraryLift } from '../library';

/** Content as a working coach would write it: common practice of the trade, no source. */
export const SPLIT_SQUAT_HOLD = libraryLift(
  'split-squat-hold',
  {
    name: 'Split-squat hold',
    pattern: 'lunge',
    tempo: '2-10-2-0',
    brief: {
      views: ['front', 'side'],
      repsMin: 1,
      repsMax: 2,
      cameraHeightCm: 60,
      cameraDistanceCm: 300,
      inFrame: 'Head, both feet, and the floor under the back knee',
      note: 'One rep each side; say in the note which leg comes first.',
    },
  },
  [
    [
      'Front knee falls in',
      'bottom',
      'front',
      'Point the knee at the second toe of its own foot',
      'Hold with a band pulling the knee in: push it out',
      'knees-fall-in',
    ],
    [
      'Front heel leaves the floor',
      'bottom',
      'side',
      'Print the whole front sole into the floor',
      'Slide a sheet of paper under the heel: it must not move',
      'heels-lift',
    ],
    [
      'Stops short of depth',
      'bottom',
      'side',
      'Lower until the back knee could hold an egg unbroken',
      'Lower onto a cushion, five slow reps',
      'shallow-depth',
    ],
    [
      'Leans over the front leg',
      'throughout',
      'side',
      'Keep your buttons over your belt',
      'Hold with a broomstick upright in front of the chest',
      'leans-forward',
    ],
    [
      'Leans to one side',
      'throughout',
      'front',
      'Stand between two walls: touch neither',
      'Hold with a light bell in the hand on the open side',
      'leans-sideways',
    ],
    [
      'Ribs flare',
      'bottom',
      'side',
      'Breathe out until the belt is level',
      'Ten slow breaths in the half kneeling start',
      'ribs-flare',
    ],
    [
      'Feet on one line',
      'set-up',
      'front',
      'Stand on rails, not on a rope',
      'Step forward from hip width, look down once, then up',
      undefined,
    ],
  ],
  [
    ['easier', 'Half-kneeling hold', 'Back knee on a cushion, ten breaths'],
    ['easier', 'Split squat holding a chair', 'One hand on the chair, five seconds down'],
    ['same', 'Short-stance hold', 'Feet one shoe closer, the same time'],
    ['harder', 'Rear foot on a step', 'A step of one hand’s height'],
  ],
);
