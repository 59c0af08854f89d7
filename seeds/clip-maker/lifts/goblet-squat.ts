import { bump, clamp01, lerp } from '../easing';
import { bellInBothHands, dumbbellInBothHands } from '../implements';
import { measuredShare } from '../measured-squats';
import { type V3, unit } from '../vec';
import { type LiftModel, type Moment, STANDING, bothArms, fromChest, stance } from './lift';

const share = (m: Moment, channel: 'knee' | 'lean'): number => {
  switch (m.kind) {
    case 'down':
      return measuredShare(m.rep, 'down', channel, m.s);
    case 'pause-bottom':
      return 1;
    case 'up':
      return 1 - measuredShare(m.rep, 'up', channel, m.s);
    case 'lead-in':
    case 'pause-top':
    case 'lead-out':
      return 0;
  }
};

/** The goblet squat; knee and trunk follow measured squats, stretched to the depth and tempo asked for. */
export const gobletSquat: LiftModel = {
  id: 'goblet-squat',
  name: 'Goblet squat',
  first: 'down',
  reps: 2,
  tempo: { downS: 1.1, pauseBottomS: 0.25, upS: 0.9, pauseTopS: 0.25 },
  leadOutMs: 450,
  implement: 'kettlebell',
  loadKg: 16,
  primaryAngle: 'kneeRight',
  camera: STANDING,
  pose: (m) => {
    const h = m.body.heightM;
    const range = m.depth * (1 - 0.42 * m.dose('shallow-depth'));
    const down = share(m, 'knee') * range;
    const lean = share(m, 'lean') * range;
    const deep = clamp01((down - 0.45) / 0.5);
    const rounding = m.dose('rounded-back') * deep;
    const first = m.dose('hips-rise-first') * (m.kind === 'up' ? bump(m.s, 0.02, 0.95) : 0);
    const away = m.dose('bell-drifts-away') * clamp01(down * 1.5);
    const drop = m.dose('chest-drops') * clamp01(down * 1.2);
    const trunk = lerp(1, 27, lean) + 22 * drop + 26 * first - 8 * rounding;
    return {
      trunk: trunk + 0.4 * m.drift[0],
      lumbar: -2 + 20 * rounding,
      thoracic: 3 + 20 * rounding + 4 * drop,
      gaze: trunk * 0.4,
      shrug: 0,
      root: {
        kind: 'balanced',
        lead: 'right',
        knee: lerp(4, 114, down) - 22 * first,
        overX: 0.006 * m.drift[1] + 0.03 * m.dose('heels-lift') * deep,
        carriedKg: m.loadKg,
      },
      legs: stance(
        0.215 * h,
        20,
        22 * m.dose('heels-lift') * clamp01((down - 0.3) / 0.5),
        46 * m.dose('knees-fall-in') * clamp01(down * 1.4),
      ),
      arms: (torso) =>
        bothArms((_side, out) => ({
          wrist: fromChest(torso, (0.105 + 0.11 * away) * h, (-0.062 - 0.03 * away) * h, out, 0.034 * h),
          pole: [-0.15, -1, out[2] * 0.42],
          handDirection: towardsGrip(torso.chestUp, torso.chestFront, out),
        })),
    };
  },
  held: (skeleton, m) => {
    const { chestUp } = skeleton.torso;
    const hang: V3 = unit([-chestUp[0] * 0.5, -1, 0]);
    return [
      m.implement === 'dumbbell'
        ? dumbbellInBothHands(skeleton, hang)
        : bellInBothHands(skeleton, hang, m.loadKg),
    ];
  },
};

function towardsGrip(up: V3, front: V3, out: V3): V3 {
  return [up[0] * 0.75 + front[0] * 0.6, up[1] * 0.75 + front[1] * 0.6, -out[2] * 0.25];
}
