import { lerp } from '../easing';
import { inEachHand } from '../implements';
import { along } from '../vec';
import { type LiftModel, STANDING, bothArms, lowered } from './lift';

/** The split-squat hold: right foot in front, down once, held, up again. */
export const splitSquatHold: LiftModel = {
  id: 'split-squat-hold',
  name: 'Split-squat hold',
  first: 'down',
  reps: 1,
  tempo: { downS: 1, pauseBottomS: 1.6, upS: 0.9, pauseTopS: 0.1 },
  leadOutMs: 400,
  implement: 'dumbbell',
  loadKg: 20,
  primaryAngle: 'kneeRight',
  camera: STANDING,
  pose: (m) => {
    const h = m.body.heightM;
    const range = m.depth * (1 - 0.45 * m.dose('shallow-depth'));
    const d = lowered(m, 'down') * range;
    const flare = m.dose('ribs-flare') * d;
    const trunk = lerp(2, 5, d) + 26 * m.dose('leans-forward') * d + 6 * flare;
    // A held position is never quite still.
    const tremble = m.kind === 'pause-bottom' ? 1.1 * m.drift[2] : 0;
    return {
      trunk: trunk + 0.7 * m.drift[0],
      sideLean: 0.5 * m.drift[1] + 16 * m.dose('leans-sideways') * d,
      lumbar: -2 - 20 * flare,
      thoracic: 3 - 8 * flare,
      gaze: trunk * 0.4 + 2,
      shrug: -0.004,
      root: {
        kind: 'balanced',
        lead: 'right',
        knee: lerp(20, 96, d) + tremble,
        overX: 0.03 * h,
        carriedKg: m.loadKg,
      },
      legs: {
        right: {
          kind: 'planted',
          foot: { x: 0.215 * h, z: 0.062 * h, toeOut: 3, heelLift: 24 * m.dose('heels-lift') * d },
          kneeIn: 40 * m.dose('knees-fall-in') * d,
        },
        left: {
          kind: 'planted',
          foot: { x: -0.3 * h, z: -0.062 * h, toeOut: 2, heelLift: lerp(38, 58, d) },
          kneeIn: 0,
        },
      },
      arms: (torso) =>
        bothArms((side, out) => ({
          wrist: along(along(torso.shoulder[side], [0.02, -1, 0], torso.armLength * 0.995), out, 0.03 * h),
          pole: [-1, 0, out[2] * 0.3],
          handDirection: [0, -1, 0],
        })),
    };
  },
  held: (skeleton, m) =>
    m.implement === 'none'
      ? []
      : inEachHand(
          skeleton,
          m.implement === 'kettlebell' ? 'kettlebell' : 'dumbbell',
          m.loadKg / 2,
          [1, 0, 0],
          [0, -1, 0],
        ),
};
