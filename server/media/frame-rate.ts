import { type Rational, reduce, toNumber } from './rational';

/** The instants of a film's pictures, boiled down. Times in seconds on the container's clock. */
export interface FrameTiming {
  frames: number;
  /** The first picture's instant. */
  startS: number;
  /** From the first picture's instant to the end of the last one's showing. */
  durationS: number;
  /** The rate at which pictures come where they come regularly. */
  frameRate: Rational;
  /** Pictures do not come regularly: more than one in fifty is early or late by a quarter of a picture. */
  variable: boolean;
}

/** Rates that cameras use, in pictures a second. */
const STANDARD_RATES: readonly Rational[] = [
  ...[10, 12, 15, 20, 24, 25, 30, 48, 50, 60, 90, 100, 120, 200, 240].map((num) => ({ num, den: 1 })),
  ...[15000, 24000, 30000, 60000, 120000, 240000].map((num) => ({ num, den: 1001 })),
];

function nearest(rates: readonly Rational[], rate: number): Rational | null {
  let best: Rational | null = null;
  for (const candidate of rates) {
    if (!best || Math.abs(toNumber(candidate) - rate) < Math.abs(toNumber(best) - rate)) best = candidate;
  }
  return best;
}

const within = (candidate: Rational | null, rate: number, share: number): candidate is Rational =>
  candidate !== null && Math.abs(toNumber(candidate) - rate) <= share * rate;

function quantile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? 0;
}

/**
 * Measures a film's rate from the instants of its pictures, whatever the file declares.
 *
 * @param timesS each picture's instant, in any order
 * @param lastDurationS how long the last picture stays, if the file says so
 * @param declared the rate in the file's header; used for its exact rational where it agrees with the measurement
 * @returns `null` for fewer than two pictures at distinct instants
 */
export function measureTiming(
  timesS: readonly number[],
  lastDurationS: number | null,
  declared: Rational | null,
): FrameTiming | null {
  const sorted = [...new Set(timesS)].sort((a, b) => a - b);
  const startS = sorted[0];
  const endS = sorted.at(-1);
  if (startS === undefined || endS === undefined || sorted.length < 2) return null;

  const gaps = sorted.slice(1).map((time, i) => time - (sorted[i] ?? time));
  const sortedGaps = [...gaps].sort((a, b) => a - b);
  const median = quantile(sortedGaps, 0.5);
  // Containers that count in milliseconds are off by up to 1 ms a gap.
  const regular = gaps.filter((gap) => Math.abs(gap - median) <= 0.25 * median + 0.0011);
  const variable = gaps.length - regular.length > gaps.length / 50;

  const frameRate = variable
    ? // Where light or load made the camera stumble, its faster pace is the one that loses no picture.
      snapVariable(1 / quantile(sortedGaps, 0.25))
    : snapConstant(regular.length / regular.reduce((sum, gap) => sum + gap, 0), declared);
  const lastS =
    lastDurationS && lastDurationS > 0 && lastDurationS < 1 ? lastDurationS : 1 / toNumber(frameRate);
  return { frames: timesS.length, startS, durationS: endS - startS + lastS, frameRate, variable };
}

function snapConstant(rate: number, declared: Rational | null): Rational {
  if (within(declared, rate, 0.002)) return declared;
  const standard = nearest(STANDARD_RATES, rate);
  if (within(standard, rate, 0.005)) return standard;
  return reduce({ num: Math.max(1, Math.round(rate * 1000)), den: 1000 });
}

function snapVariable(rate: number): Rational {
  const standard = nearest(STANDARD_RATES, rate);
  if (within(standard, rate, 0.1)) return standard;
  return { num: Math.max(1, Math.round(rate)), den: 1 };
}

/** The fastest proxy: what screens show and browsers step through reliably. */
export const MAX_PROXY_RATE = 60;

/**
 * The proxy's rate for a source's: the same up to 60, otherwise the source's divided by the smallest whole number
 * that brings it there, so that every proxy picture is one of the source's (240 → 60, 120000/1001 → 60000/1001).
 */
export function proxyRate(source: Rational): Rational {
  const divisor = Math.max(1, Math.ceil(toNumber(source) / MAX_PROXY_RATE - 0.02));
  return reduce({ num: source.num, den: source.den * divisor });
}
