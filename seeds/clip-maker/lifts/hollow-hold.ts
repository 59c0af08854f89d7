import type { LegPose } from '../skeleton';
import { lerp } from '../easing';
import { RIGHT, along, turn } from '../vec';
import { LYING, type LiftModel, bothArms, lowered } from './lift';

/** The hollow hold: on the back, low back pressed down, shoulders and straight legs off the floor. */
export const hollowHold: LiftModel = {
  id: 'hollow-hold',
  name: 'Hollow hold',
  first: 'up',
  reps: 1,
  tempo: { downS: 0.9, pauseBottomS: 0.2, upS: 0.9, pauseTopS: 1.7 },
  leadOutMs: 300,
  implement: 'none',
  loadKg: 0,
  primaryAngle: 'hipRight',
  camera: LYING,
  pose: (m) => {
    const h = m.body.heightM;
    const up = (1 - lowered(m, 'up')) * m.depth;
    const arch = m.dose('low-back-lifts') * up;
    const hold = m.kind === 'pause-top' ? 1 : 0;
    const leg: LegPose = {
      kind: 'free',
      hip: lerp(1, 20, up) + 36 * m.dose('legs-too-high') * up + (0.8 * m.drift[2] + 0.3 * m.drift[0]) * hold,
      knee: 2 + 46 * m.dose('knees-bend') * up,
      ankle: lerp(18, 42, up),
      spread: lerp(2.5, 0.8, up),
    };
    return {
      trunk: -90 + 3 * arch,
      lumbar: lerp(-4, 8, up) - 28 * arch,
      thoracic: lerp(2, 24, up) + 3 * arch + 0.5 * m.drift[1] * hold,
      gaze: lerp(-86, -56, up) + 30 * m.dose('chin-pokes') * up,
      shrug: 0,
      root: { kind: 'placed', at: [-0.05 * h, 0.06 * h, 0] },
      legs: { left: leg, right: leg },
      arms: (torso) =>
        bothArms((side, out) => {
          const forward = lerp(4, 14, up) + 60 * m.dose('arms-drop') * up;
          const way = turn(torso.chestUp, RIGHT, -forward);
          return {
            wrist: along(along(torso.shoulder[side], way, torso.armLength * 1.02), out, -0.02 * h),
            pole: out,
            palm: torso.chestFront,
          };
        }),
    };
  },
  held: () => [],
};
