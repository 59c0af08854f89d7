import { clamp01, minJerk } from './easing';
import measured from './data/measured-squats.json' with { type: 'json' };

/**
 * The share of its way that knee flexion or trunk lean has covered at progress s of a phase, 0 to 1, as measured on
 * one person's body-weight squats (source and licence stand in the data file). Rep numbers beyond the measured ones
 * start again. The ends are softened because the measured reps were cut out of a moving set.
 */
export function measuredShare(
  rep: number,
  phase: 'down' | 'up',
  channel: 'knee' | 'lean',
  s: number,
): number {
  const curves = measured.reps[(rep - 1) % measured.reps.length];
  if (!curves) throw new Error(`No measured squat for rep ${rep}`);
  const shares = curves[`${phase}${channel === 'knee' ? 'Knee' : 'Lean'}`];
  const soft = 0.6 * clamp01(s) + 0.4 * minJerk(s);
  const at = soft * (shares.length - 1);
  const i = Math.min(shares.length - 2, Math.floor(at));
  const a = shares[i] ?? 0;
  const b = shares[i + 1] ?? a;
  return a + (b - a) * (at - i);
}
