import { bump, during, lerp, track } from '../easing';
import { barInHands } from '../implements';
import { type LiftModel, type Moment, STANDING, blend, bothArms, fromShoulders, stance } from './lift';
import { RACK, RACK_HAND, RACK_POLE } from './rack';

interface State {
  knee: number;
  heel: number;
  /** 0 bar on the shoulders, 1 overhead. */
  press: number;
  dip: number;
}

function stateOf(m: Moment): State {
  const early = m.dose('early-arm-pull');
  const dip = 33 * m.depth;
  switch (m.kind) {
    case 'lead-in':
    case 'lead-out':
    case 'pause-bottom':
      return { knee: 4, heel: 0, press: 0, dip: 0 };
    case 'up':
      return {
        knee: track(m.s, [[0, 4], [0.34, 4 + dip], [0.54, 1], [1, 3]]),
        heel: 12 * bump(m.s, 0.44, 0.72),
        press: during(m.s, 0.42 - 0.34 * early, 0.9),
        dip: bump(m.s, 0.04, 0.6),
      }; // prettier-ignore
    case 'pause-top':
      return { knee: 3, heel: 0, press: 1, dip: 0 };
    case 'down':
      return {
        knee: 3 + 17 * bump(m.s, 0.5, 1),
        heel: 0,
        press: 1 - during(m.s, 0, 0.76),
        dip: 0,
      };
  }
}

/** The push press: a short dip of the legs throws the bar, the arms finish overhead. */
export const pushPress: LiftModel = {
  id: 'push-press',
  name: 'Push press',
  first: 'up',
  reps: 2,
  tempo: { downS: 0.8, pauseBottomS: 0.2, upS: 1, pauseTopS: 0.35 },
  leadOutMs: 300,
  implement: 'barbell',
  loadKg: 30,
  primaryAngle: 'shoulderRight',
  camera: STANDING,
  pose: (m) => {
    const h = m.body.heightM;
    const st = stateOf(m);
    const flare = m.dose('ribs-flare') * st.press;
    const lean = m.dose('leans-forward') * st.dip;
    const heels = m.dose('heels-lift') * st.dip;
    const trunk = 1 + 20 * lean + 10 * flare;
    const uneven = m.dose('uneven-press') * 0.085 * Math.sin(Math.PI * Math.min(1, st.press * 0.8));
    return {
      trunk: trunk + 0.4 * m.drift[0],
      lumbar: -2 - 24 * flare,
      thoracic: 3 - 9 * flare,
      gaze: trunk * 0.4 - 9 * bump(st.press, 0.02, 0.7) + 3,
      shrug: 0,
      root: {
        kind: 'balanced',
        lead: 'right',
        knee: st.knee,
        overX: 0.004 * m.drift[1],
        carriedKg: m.loadKg * 0.7,
      },
      legs: stance(0.17 * h, 12, st.heel + 20 * heels, 60 * m.dose('knees-fall-in') * st.dip),
      arms: (torso) =>
        bothArms((side, out) => {
          const soft = m.dose('soft-lockout');
          const reach = (torso.armLength * (0.996 - 0.08 * soft)) / h + 0.026;
          const forward = track(st.press, [[0, RACK.forward], [0.3, 0.085], [1, 0.004]]); // prettier-ignore
          const up = lerp(RACK.up, reach, st.press) - (side === 'right' ? 1 : -1) * uneven;
          return {
            wrist: fromShoulders(torso, forward * h, up * h, out, m.body.shoulderHalf + 0.028 * h),
            pole: blend(RACK_POLE(out), [0.35, -0.3, out[2]], during(st.press, 0.05, 0.6)),
            handDirection: blend(RACK_HAND(out), [-0.35, 1, 0], st.press),
            palm: [1, 0.3, 0],
          };
        }),
    };
  },
  held: (skeleton) => [barInHands(skeleton)],
};
