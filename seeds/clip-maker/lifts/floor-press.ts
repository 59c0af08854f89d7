import { bump, clamp01 } from '../easing';
import { inOneHand } from '../implements';
import type { LegPose, Side } from '../skeleton';
import { type V3, add, along, mix, sagittal, scale, unit } from '../vec';
import { LYING, type LiftModel, lowered } from './lift';

/** The single-arm floor press: on the back, the right arm works, the left lies out for balance. */
export const floorPress: LiftModel = {
  id: 'floor-press',
  name: 'Single-arm floor press',
  first: 'down',
  reps: 2,
  tempo: { downS: 1, pauseBottomS: 0.3, upS: 0.75, pauseTopS: 0.3 },
  leadOutMs: 450,
  implement: 'dumbbell',
  loadKg: 16,
  primaryAngle: 'elbowRight',
  camera: LYING,
  pose: (m) => {
    const h = m.body.heightM;
    const d = lowered(m, 'down') * m.depth * (1 - 0.5 * m.dose('short-range'));
    const lift = m.dose('hips-lift') * (m.kind === 'up' ? bump(m.s, 0, 1) : 0);
    const trunk = -90 - 16 * lift;
    const thickness = 0.062 * h * m.body.chest;
    // Shoulders stay where they lie; the hips rise from them.
    const shoulders: V3 = [-0.34 * h, thickness, 0];
    const hips = add(shoulders, scale(sagittal(trunk), -m.body.trunk));
    const leg = (side: Side): LegPose => ({
      kind: 'planted',
      foot: {
        x: 0.27 * h - 0.34 * h + m.body.trunk,
        z: (side === 'right' ? 1 : -1) * 0.1 * h,
        toeOut: 8,
        heelLift: 0,
      },
      kneeIn: 0,
      kneesUp: true,
    });
    return {
      trunk,
      lumbar: 0,
      thoracic: 2,
      gaze: -88,
      shrug: 0,
      root: { kind: 'placed', at: hips },
      legs: { left: leg('left'), right: leg('right') },
      arms: (torso) => {
        const s = torso.shoulder.right;
        const abduction = 45 + 42 * m.dose('elbow-flares') * clamp01(d * 1.5);
        const a = (abduction * Math.PI) / 180;
        const upperArm = unit([Math.cos(a), -0.12, Math.sin(a)]);
        const bottom = add(along(s, upperArm, m.body.upperArm), [-0.02 * h, m.body.forearm, 0.01 * h]);
        const reach = torso.armLength * (1.03 - 0.12 * m.dose('soft-lockout'));
        const drift = m.dose('press-drifts') * 24;
        const top = along(s, sagittal(drift), reach);
        const across = mix(top, bottom, d);
        const other = torso.shoulder.left;
        return {
          right: {
            wrist: add(across, [0.004 * m.drift[0] * (1 - d), 0, 0.004 * m.drift[1]]),
            pole: upperArm,
            handDirection: [0.02, 1, 0],
            palm: [1, 0, 0],
          },
          left: {
            wrist: along(other, unit([0.8, -0.07, -0.62]), torso.armLength * 0.985),
            pole: [0, -0.2, -1],
            palm: [0, -1, 0],
          },
        };
      },
    };
  },
  held: (skeleton, m) => {
    const kind = m.implement === 'kettlebell' ? 'kettlebell' : 'dumbbell';
    return [inOneHand(skeleton, 'right', kind, m.loadKg, [0.3, 0, 1], [0.15, -0.6, 0.8])];
  },
};
