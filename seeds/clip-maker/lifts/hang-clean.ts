import { bump, during, lerp, track } from '../easing';
import { barInHands } from '../implements';
import type { V3 } from '../vec';
import { type LiftModel, type Moment, STANDING, blend, bothArms, fromShoulders, stance } from './lift';
import { RACK, RACK_HAND, RACK_POLE } from './rack';

interface State {
  trunk: number;
  knee: number;
  heel: number;
  /** Wrist from mid-shoulder, fractions of height. */
  forward: number;
  up: number;
  /** 0 elbows behind the bar, 1 elbows through in front of it. */
  through: number;
  shrug: number;
  /** 1 at the full extension of the hips. */
  extended: number;
  /** 1 in the deepest part of the catch. */
  caught: number;
  hinge: number;
}

const STRAIGHT = -0.326;
const AT_HIPS: State = {
  trunk: 1,
  knee: 4,
  heel: 0,
  forward: 0.062,
  up: STRAIGHT,
  through: 0,
  shrug: 0,
  extended: 0,
  caught: 0,
  hinge: 0,
};

function stateOf(m: Moment): State {
  const deep = m.depth;
  const early = m.dose('early-arm-pull');
  const away = m.dose('bar-swings-away');
  const hang: State = {
    ...AT_HIPS,
    trunk: 44 * deep,
    knee: 30 * deep,
    forward: -0.052,
    up: -0.324,
    hinge: 1,
  };
  const racked: State = { ...AT_HIPS, trunk: 2, knee: 5, forward: RACK.forward, up: RACK.up, through: 1 };
  switch (m.kind) {
    case 'lead-in':
      return AT_HIPS;
    case 'down': {
      if (m.rep === 1) return between(AT_HIPS, hang, during(m.s, 0, 1));
      const hinge = during(m.s, 0.42, 1);
      return {
        trunk: lerp(2, hang.trunk, hinge) + 4 * bump(m.s, 0.1, 0.5),
        knee: lerp(5, hang.knee, hinge) + 12 * bump(m.s, 0.2, 0.6),
        heel: 0,
        forward: track(m.s, [[0, RACK.forward], [0.2, 0.1], [0.5, 0.066], [1, hang.forward]]),
        up: track(m.s, [[0, RACK.up], [0.48, STRAIGHT], [1, hang.up]]),
        through: 1 - during(m.s, 0, 0.22),
        shrug: 0,
        extended: 0,
        caught: 0,
        hinge,
      }; // prettier-ignore
    }
    case 'pause-bottom':
      return hang;
    case 'up':
      return {
        trunk: track(m.s, [[0, hang.trunk], [0.36, -2], [0.42, -3], [0.66, 10], [1, 2]]),
        knee: track(m.s, [[0, hang.knee], [0.17, hang.knee * 0.86], [0.38, 3], [0.66, 30 + 34 * deep], [1, 5]]),
        heel: 16 * bump(m.s, 0.27, 0.57),
        forward: track(m.s, [[0, hang.forward], [0.36, 0.06 + 0.03 * early], [0.5, 0.088], [0.66, RACK.forward], [1, RACK.forward]]) + 0.13 * away * bump(m.s, 0.22, 0.64),
        up: track(m.s, [[0, hang.up], [0.34 - 0.22 * early, STRAIGHT], [0.66, RACK.up], [1, RACK.up]]) + 0.05 * early * bump(m.s, 0, 0.4),
        through: during(m.s, 0.5, 0.67),
        shrug: 0.022 * bump(m.s, 0.3, 0.58),
        extended: bump(m.s, 0.25, 0.6),
        caught: bump(m.s, 0.52, 1),
        hinge: 1 - during(m.s, 0, 0.4),
      }; // prettier-ignore
    case 'pause-top':
      return racked;
    case 'lead-out':
      return racked;
  }
}

function between(a: State, b: State, s: number): State {
  const keys = Object.keys(a) as (keyof State)[];
  return Object.fromEntries(keys.map((key) => [key, lerp(a[key], b[key], s)])) as unknown as State;
}

/** The hang clean: hinge to the knees, jump the hips through, catch the bar on the shoulders, stand. */
export const hangClean: LiftModel = {
  id: 'hang-clean',
  name: 'Hang clean',
  first: 'down',
  reps: 2,
  tempo: { downS: 0.9, pauseBottomS: 0.15, upS: 1.15, pauseTopS: 0.25 },
  leadOutMs: 300,
  implement: 'barbell',
  loadKg: 40,
  primaryAngle: 'hipRight',
  camera: STANDING,
  pose: (m) => {
    const h = m.body.heightM;
    const st = stateOf(m);
    const rounding = m.dose('rounded-back') * st.hinge;
    const squat = m.dose('squats-instead-of-hinging') * st.hinge;
    const low = m.dose('elbows-low') * st.through;
    const trunk = st.trunk - 24 * squat - 12 * rounding - 15 * m.dose('leans-back') * st.extended;
    return {
      trunk: trunk + 0.4 * m.drift[0],
      lumbar: -2 + 20 * rounding,
      thoracic: 3 + 20 * rounding + 5 * low,
      gaze: trunk * 0.45,
      shrug: st.shrug,
      root: {
        kind: 'balanced',
        lead: 'right',
        knee: st.knee + 45 * squat,
        overX: 0.005 * m.drift[1],
        carriedKg: m.loadKg * 0.6,
      },
      legs: stance(0.18 * h, 13, st.heel, 42 * m.dose('knees-fall-in') * st.caught),
      arms: (torso) =>
        bothArms((_side, out) => {
          const pole = blend([-0.35, 0.25, out[2]], RACK_POLE(out), st.through);
          const drop: V3 = [-1.25 * low, -0.7 * low, 0];
          return {
            wrist: fromShoulders(
              torso,
              st.forward * h,
              (st.up - 0.03 * low) * h,
              out,
              m.body.shoulderHalf + 0.028 * h,
            ),
            pole: [pole[0] + drop[0], pole[1] + drop[1], pole[2]],
            handDirection: blend([0.1, -1, 0], RACK_HAND(out), st.through),
            palm: blend([-1, 0, 0], [1, 0.25, 0], st.through),
          };
        }),
    };
  },
  held: (skeleton) => [barInHands(skeleton)],
};
