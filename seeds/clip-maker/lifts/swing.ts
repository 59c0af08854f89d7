import { bump, during, lerp, minJerk } from '../easing';
import { bellInBothHands } from '../implements';
import { sagittal } from '../vec';
import { type LiftModel, type Moment, STANDING, bothArms, stance } from './lift';

/** Arm angles from hanging, forward positive, degrees. */
const HANG = 13;
const TOP = 87;
const BACK = -40;

interface State {
  /** 0 upright, 1 fully hinged. */
  hinge: number;
  arm: number;
  /** 1 at the top of the swing. */
  top: number;
  /** How far the arms pull by themselves, 0 to 1. */
  pull: number;
}

function stateOf(m: Moment): State {
  const back = lerp(BACK, -6, m.dose('bell-too-low'));
  const early = m.dose('arms-lift-early');
  switch (m.kind) {
    case 'lead-in':
      return { hinge: 0, arm: HANG, top: 0, pull: 0 };
    case 'down':
      return m.rep === 1
        ? { hinge: during(m.s, 0, 0.95), arm: lerp(HANG, back, during(m.s, 0.2, 1)), top: 0, pull: 0 }
        : // The bell falls first; the hinge meets it when the arms touch the body.
          {
            hinge: during(m.s, 0.36, 1),
            arm: lerp(TOP, back, during(m.s, 0, 0.96)),
            top: 1 - during(m.s, 0, 0.35),
            pull: 0,
          };
    case 'pause-bottom':
      return { hinge: 1, arm: back, top: 0, pull: 0 };
    case 'up':
      return {
        hinge: 1 - during(m.s, 0.1 * early, 0.62 + 0.25 * early),
        arm: lerp(back, TOP, during(m.s, 0.06 - 0.06 * early, 1 - 0.12 * early)),
        top: during(m.s, 0.6, 1),
        pull: early * bump(m.s, 0.08, 1),
      };
    case 'pause-top':
      return { hinge: 0, arm: TOP, top: 1, pull: 0 };
    case 'lead-out':
      return {
        hinge: 0.34 * bump(m.s, 0.15, 0.95),
        arm: lerp(TOP, HANG, minJerk(m.s)),
        top: 1 - during(m.s, 0, 0.4),
        pull: 0,
      };
  }
}

/** The arm's angle, held in front of the thighs for as long as the hips have not gone back. */
function armClearOfBody(m: Moment): number {
  const { hinge, arm } = stateOf(m);
  return Math.max(arm, lerp(HANG, BACK, hinge ** 0.8));
}

/** The two-handed swing: a hinge throws the bell, the arms only hold it. */
export const swing: LiftModel = {
  id: 'swing',
  name: 'Two-handed swing',
  first: 'down',
  reps: 3,
  tempo: { downS: 0.68, pauseBottomS: 0, upS: 0.6, pauseTopS: 0.05 },
  leadOutMs: 850,
  implement: 'kettlebell',
  loadKg: 16,
  primaryAngle: 'hipRight',
  camera: STANDING,
  pose: (m) => {
    const { hinge, top, pull } = stateOf(m);
    const arm = armClearOfBody(m);
    const h = m.body.heightM;
    const squat = m.dose('squats-instead-of-hinging');
    const low = m.dose('bell-too-low');
    const deep = hinge * m.depth;
    const rounding = m.dose('rounded-back') * hinge;
    const flare = m.dose('ribs-flare') * top;
    const trunk =
      lerp(1, 62 - 34 * squat + 6 * low, deep) - 15 * m.dose('leans-back') * top - 12 * rounding + 8 * flare;
    return {
      trunk: trunk + 0.4 * m.drift[0],
      lumbar: 22 * rounding - 20 * flare - 1,
      thoracic: 4 + 18 * rounding - 8 * flare,
      gaze: trunk * 0.62 + 3,
      shrug: -0.004 + 0.012 * pull,
      root: {
        kind: 'balanced',
        lead: 'right',
        knee: lerp(4, 34 + 52 * squat + 6 * low, deep),
        overX: 0.006 * m.drift[1],
        // The flying bell is balanced by its own speed; the body leans only a little against it.
        carriedKg: m.loadKg * 0.3,
      },
      legs: stance(0.235 * h, 14, 17 * m.dose('heels-lift') * bump((top + 1 - hinge) / 2, 0.2, 1.6), 0),
      arms: (torso) =>
        bothArms((side, out) => {
          const wide = 0.026 * h;
          const across = m.body.shoulderHalf - wide;
          const straight = Math.sqrt((torso.armLength * 0.999) ** 2 - across ** 2);
          const reach = straight * (1 - 0.15 * pull);
          const way = sagittal(180 - arm);
          const middle = torso.midShoulder;
          return {
            wrist: [middle[0] + way[0] * reach, middle[1] + way[1] * reach, middle[2] + out[2] * wide],
            pole: [-0.3, -0.5 - 0.3 * top, out[2]],
            handDirection: [way[0], way[1], way[2] - out[2] * 0.12],
            palm: [way[1], -way[0], 0],
          };
        }),
    };
  },
  held: (skeleton, m) => [bellInBothHands(skeleton, sagittal(180 - armClearOfBody(m) * 0.97), m.loadKg)],
};
