/** Seconds of a rep: lowering, pause at the bottom, lifting, pause at the top. */
export interface Tempo {
  downS: number;
  pauseBottomS: number;
  upS: number;
  pauseTopS: number;
}

export type PhaseKind = 'lead-in' | 'down' | 'pause-bottom' | 'up' | 'pause-top' | 'lead-out';

export interface Phase {
  kind: PhaseKind;
  /** 1 for the first rep; 0 before it, and the last rep's number after it. */
  rep: number;
  startMs: number;
  endMs: number;
}

export interface RepInstant {
  rep: number;
  kind: 'top' | 'bottom';
  /** The middle of the pause, or the turning instant when there is none. */
  atMs: number;
}

export interface Timeline {
  phases: Phase[];
  instants: RepInstant[];
  durationMs: number;
}

const LEAD_MS = 450;

/** The phases of a whole set. `first` says whether a rep begins by lowering or by lifting. */
export function timelineOf(
  first: 'down' | 'up',
  reps: number,
  tempo: Tempo,
  leadInMs = LEAD_MS,
  leadOutMs = LEAD_MS,
): Timeline {
  const phases: Phase[] = [];
  let at = 0;
  const put = (kind: PhaseKind, rep: number, ms: number): void => {
    const length = Math.round(ms);
    phases.push({ kind, rep, startMs: at, endMs: at + length });
    at += length;
  };
  put('lead-in', 0, leadInMs);
  const down: [PhaseKind, number][] = [
    ['down', tempo.downS],
    ['pause-bottom', tempo.pauseBottomS],
  ];
  const up: [PhaseKind, number][] = [
    ['up', tempo.upS],
    ['pause-top', tempo.pauseTopS],
  ];
  for (let rep = 1; rep <= reps; rep++) {
    for (const [kind, s] of first === 'down' ? [...down, ...up] : [...up, ...down]) put(kind, rep, s * 1000);
  }
  put('lead-out', reps, leadOutMs);
  const instants = phases
    .filter((phase) => phase.kind === 'pause-bottom' || phase.kind === 'pause-top')
    .map((phase): RepInstant => ({
      rep: phase.rep,
      kind: phase.kind === 'pause-top' ? 'top' : 'bottom',
      atMs: Math.round((phase.startMs + phase.endMs) / 2),
    }));
  return { phases, instants, durationMs: at };
}

/** The phase at an instant and how far through it is, 0 to 1. */
export function phaseAt(timeline: Timeline, tMs: number): { phase: Phase; progress: number } {
  const lastPhase = timeline.phases[timeline.phases.length - 1];
  const phase = timeline.phases.find((p) => tMs < p.endMs) ?? lastPhase;
  if (!phase) throw new Error('A time line needs at least one phase');
  const length = phase.endMs - phase.startMs;
  return { phase, progress: length > 0 ? Math.min(1, Math.max(0, (tMs - phase.startMs) / length)) : 1 };
}
