import { bump, clamp01, lerp } from '../easing';
import { barInHands, inEachHand } from '../implements';
import { along, mix } from '../vec';
import { type LiftModel, STANDING, bothArms, lowered, stance } from './lift';

/** The bent-over row: the hinge is held, the bar goes from hanging to the belly. */
export const bentOverRow: LiftModel = {
  id: 'bent-over-row',
  name: 'Bent-over row',
  first: 'up',
  reps: 3,
  tempo: { downS: 0.7, pauseBottomS: 0.15, upS: 0.55, pauseTopS: 0.2 },
  leadOutMs: 350,
  implement: 'barbell',
  loadKg: 40,
  primaryAngle: 'elbowRight',
  camera: STANDING,
  pose: (m) => {
    const h = m.body.heightM;
    const pull = (1 - lowered(m, 'up')) * m.depth * (1 - 0.45 * m.dose('short-range'));
    const rounding = m.dose('rounded-back');
    const squat = m.dose('squats-instead-of-hinging');
    const rise = m.dose('torso-rises') * clamp01(pull * 1.1);
    const trunk = 57 - 24 * rise - 14 * rounding - 8 * squat - 1.5 * pull;
    const lag = (m.kind === 'up' ? 0.45 * bump(m.s, 0, 1.4) : 0.32 * pull) * m.dose('uneven-pull');
    return {
      trunk: trunk + 0.4 * m.drift[0],
      lumbar: -1 + 22 * rounding,
      thoracic: 3 + 22 * rounding - 2 * pull,
      gaze: trunk * 0.78,
      shrug: -0.006 * (1 - pull),
      root: {
        kind: 'balanced',
        lead: 'right',
        knee: 26 + 40 * squat - 4 * rise,
        overX: 0.005 * m.drift[1],
        carriedKg: m.loadKg,
      },
      legs: stance(0.19 * h, 10, 0, 0),
      arms: (torso) =>
        bothArms((side, out) => {
          const mine = Math.max(0, pull - (side === 'right' ? lag : 0));
          const wide = m.body.shoulderHalf + 0.035 * h;
          const middle = torso.midShoulder;
          const hang = along([middle[0] - 0.01 * h, middle[1] - torso.armLength * 0.99, 0], out, wide);
          const belly = along(
            along(
              along(torso.midHip, torso.pelvisUp, 0.1 * h),
              torso.pelvisFront,
              (0.085 + 0.02 * m.body.waist) * h,
            ),
            out,
            wide,
          );
          return {
            wrist: mix(hang, belly, mine),
            pole: [-0.7, 0.9, out[2] * 0.5],
            handDirection: [lerp(0, 0.25, mine), -1, 0],
            palm: [-1, 0, 0],
          };
        }),
    };
  },
  held: (skeleton, m) =>
    m.implement === 'dumbbell' || m.implement === 'kettlebell'
      ? inEachHand(skeleton, m.implement, m.loadKg / 2, [1, 0, 0], [0, -1, 0])
      : [barInHands(skeleton)],
};
