/** One item that was waited for: how long, and whether the wait ended (`event`) or is only known to be longer. */
export interface Observation {
  readonly time: number;
  readonly event: boolean;
}

/** How confidence limits are taken: on the share itself, on its logarithm, or on log(−log). */
export type IntervalTransform = 'plain' | 'log' | 'log-log';

export interface SurvivalStep {
  readonly time: number;
  readonly atRisk: number;
  readonly events: number;
  /** Share still waiting after `time`. */
  readonly share: number;
  /** Greenwood's standard error; it and the 95 % limits are null where the share is 0. */
  readonly standardError: number | null;
  readonly low: number | null;
  readonly high: number | null;
}

export interface SurvivalCurve {
  /** One step for each time with an event, in order. */
  readonly steps: readonly SurvivalStep[];
  /** The longest time seen, ended or not; null without observations. */
  readonly lastTime: number | null;
}

export interface Quantile {
  /** Null where the curve does not fall so far. */
  readonly time: number | null;
  /** 95 % limits; null where not reached. */
  readonly low: number | null;
  readonly high: number | null;
}

const Z95 = 1.959963984540054;
const TOLERANCE = 1e-9;

function limits(share: number, se: number, transform: IntervalTransform): [number, number] {
  if (transform === 'plain') return [Math.max(0, share - Z95 * se), Math.min(1, share + Z95 * se)];
  const relative = (Z95 * se) / share;
  if (transform === 'log') return [share * Math.exp(-relative), Math.min(1, share * Math.exp(relative))];
  const spread = relative / Math.abs(Math.log(share));
  return [share ** Math.exp(spread), share ** Math.exp(-spread)];
}

/**
 * Kaplan–Meier estimate of the share still waiting (Kaplan & Meier 1958), Greenwood's variance, 95 % limits.
 * An item last seen waiting at the very time of an event counts as at risk for it.
 */
export function kaplanMeier(
  observations: readonly Observation[],
  transform: IntervalTransform = 'log-log',
): SurvivalCurve {
  const ordered = [...observations].sort((a, b) => a.time - b.time);
  const steps: SurvivalStep[] = [];
  let share = 1;
  let greenwood = 0;
  for (let i = 0; i < ordered.length;) {
    const time = ordered[i]?.time ?? 0;
    const atRisk = ordered.length - i;
    let events = 0;
    for (; i < ordered.length && ordered[i]?.time === time; i += 1) if (ordered[i]?.event) events += 1;
    if (events === 0) continue;
    if (events === atRisk) {
      steps.push({ time, atRisk, events, share: 0, standardError: null, low: null, high: null });
      continue;
    }
    share *= 1 - events / atRisk;
    greenwood += events / (atRisk * (atRisk - events));
    const standardError = share * Math.sqrt(greenwood);
    const [low, high] = limits(share, standardError, transform);
    steps.push({ time, atRisk, events, share, standardError, low, high });
  }
  return { steps, lastTime: ordered.at(-1)?.time ?? null };
}

/**
 * The time by which a part `done` (0 to 1; 0.5 for the median) of the items has ended, with the limits of Brookmeyer
 * & Crowley (1982): the times at which the curve's own limits cross. Where the curve stays at exactly that height
 * the middle of the flat stretch is taken, as R's `survival` does.
 */
export function quantile(curve: SurvivalCurve, done: number): Quantile {
  const height = 1 - done;
  const crossing = (of: (step: SurvivalStep) => number | null) =>
    curve.steps.find((step) => {
      const value = of(step);
      return value !== null && value <= height + TOLERANCE;
    })?.time ?? null;
  const at = curve.steps.findIndex((step) => step.share <= height + TOLERANCE);
  const step = curve.steps[at];
  let time = step?.time ?? null;
  if (step && Math.abs(step.share - height) <= TOLERANCE) {
    const flatUntil = curve.steps[at + 1]?.time ?? curve.lastTime ?? step.time;
    time = (step.time + flatUntil) / 2;
  }
  return { time, low: crossing((s) => s.low), high: crossing((s) => s.high) };
}
