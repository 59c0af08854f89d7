/** Counts in seconds; `X` = as fast as possible under control. */
export interface TempoCounts {
  /** Lowering, even where the lift starts by rising. */
  readonly downS: number;
  readonly bottomS: number;
  readonly upS: number | 'X';
  readonly topS: number;
}

const SHORT = /^(\d)(\d)([\dX])(\d)$/;
const DASHED = /^(\d{1,2})-(\d{1,2})-(\d{1,2}|X)-(\d{1,2})$/;

/** Reads `30X0` or `10-0-2-0`; null for anything else, such as three or five counts or an X for the lowering. */
export function parseTempo(written: string): TempoCounts | null {
  const match = SHORT.exec(written) ?? DASHED.exec(written);
  if (!match) return null;
  const [, down, bottom, up, top] = match;
  return {
    downS: Number(down),
    bottomS: Number(bottom),
    upS: up === 'X' ? 'X' : Number(up),
    topS: Number(top),
  };
}

/** Writes counts as four signs, with dashes where a count takes two digits. */
export function formatTempo({ downS, bottomS, upS, topS }: TempoCounts): string {
  const counts = [downS, bottomS, upS, topS].map(String);
  return counts.join(counts.some((count) => count.length > 1) ? '-' : '');
}

/** Seconds of one rep. No standard says how long X is, so the caller does. */
export function secondsPerRep(tempo: TempoCounts, secondsOfX: number): number {
  return tempo.downS + tempo.bottomS + (tempo.upS === 'X' ? secondsOfX : tempo.upS) + tempo.topS;
}

/** An instant of a clip at which the lift is at its top or its bottom, ms. */
export interface RepInstant {
  readonly atMs: number;
  readonly kind: 'top' | 'bottom';
}

export interface RepTiming {
  /** From 1. */
  readonly rep: number;
  readonly startMs: number;
  readonly downMs: number;
  readonly upMs: number;
}

/**
 * Time down and up of each whole rep. A rep runs from the first marked end (top or bottom, as the lift starts) to
 * the other and back. Marks of one kind in a row enclose a pause, which belongs to neither phase.
 */
export function repTimings(marks: readonly RepInstant[]): RepTiming[] {
  const stops: { kind: RepInstant['kind']; arriveMs: number; leaveMs: number }[] = [];
  for (const mark of [...marks].sort((a, b) => a.atMs - b.atMs)) {
    const last = stops.at(-1);
    if (last?.kind === mark.kind) last.leaveMs = mark.atMs;
    else stops.push({ kind: mark.kind, arriveMs: mark.atMs, leaveMs: mark.atMs });
  }
  const reps: RepTiming[] = [];
  for (let i = 0; i + 2 < stops.length; i += 2) {
    const [start, turn, end] = stops.slice(i, i + 3);
    if (!start || !turn || !end) break;
    const away = turn.arriveMs - start.leaveMs;
    const back = end.arriveMs - turn.leaveMs;
    reps.push({
      rep: reps.length + 1,
      startMs: start.leaveMs,
      downMs: start.kind === 'top' ? away : back,
      upMs: start.kind === 'top' ? back : away,
    });
  }
  return reps;
}

/**
 * Reps a minute from the same instant of successive reps, ms: n instants enclose n − 1 reps. Null below two.
 */
export function cadencePerMinute(instantsMs: readonly number[]): number | null {
  const span = Math.max(...instantsMs) - Math.min(...instantsMs);
  return instantsMs.length < 2 || span <= 0 ? null : ((instantsMs.length - 1) * 60_000) / span;
}
