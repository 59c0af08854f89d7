import type { AnswerDto, ClipDto, View } from '@contract';

/** What a player shows: a view, an instant of it, and whether it stands still there or loops around it. */
export interface Moment {
  view: View;
  /** On the clip's clock. */
  atMs: number;
  /** The end of a span, or null for an instant. */
  endMs: number | null;
  isStill: boolean;
}

/** A part of a clip, ms; `startMs` is before `endMs`. */
export interface LoopWindow {
  startMs: number;
  endMs: number;
}

/** How much of the movement is shown on each side of an instant, ms: about one rep in all. Common practice, no source. */
export const LOOP_SIDE_MS = 1_000;

/**
 * The part to loop around an instant or a span: a second on each side, moved inward (not cut) at the clip's ends, so
 * that an instant near an end still has its two seconds where the clip is long enough.
 */
export function loopWindow(atMs: number, endMs: number | null, durationMs: number): LoopWindow {
  const lastMs = endMs !== null && endMs > atMs ? endMs : atMs;
  const wholeMs = Math.min(durationMs, lastMs - atMs + 2 * LOOP_SIDE_MS);
  const startMs = Math.min(Math.max(0, atMs - LOOP_SIDE_MS), durationMs - wholeMs);
  return { startMs, endMs: startMs + wholeMs };
}

/** Clips that can be played, in the order in which they were asked for. */
export function playable(clips: readonly ClipDto[]): ClipDto[] {
  return clips.filter((clip) => clip.state === 'ready' && clip.media !== null && clip.durationMs !== null);
}

/**
 * The instant an answer opens on: its first comment in time, else the first fault seen, else the first measure, else
 * the beginning of the first clip. Null when no clip can be played.
 */
export function firstMoment(
  answer: Pick<AnswerDto, 'comments' | 'marks' | 'measures'> | null,
  clips: readonly ClipDto[],
): Moment | null {
  const shown = playable(clips);
  const viewOf = (clipId: string | null): View | null =>
    shown.find((clip) => clip.id === clipId)?.view ?? null;
  const found: Moment[] = [];
  const add = (clipId: string | null, atMs: number | null, endMs: number | null): void => {
    const view = viewOf(clipId);
    if (view !== null && atMs !== null) found.push({ view, atMs, endMs, isStill: false });
  };
  for (const comment of [...(answer?.comments ?? [])].sort((a, b) => a.atMs - b.atMs)) {
    add(comment.clipId, comment.atMs, comment.endMs);
  }
  for (const mark of answer?.marks ?? []) if (mark.mark === 'seen') add(mark.clipId, mark.atMs, null);
  for (const measure of answer?.measures ?? []) add(measure.clipId, measure.atMs, null);
  const first = shown[0];
  return found[0] ?? (first ? { view: first.view, atMs: 0, endMs: first.durationMs, isStill: false } : null);
}

/** The seconds of a fragment `t=3.2`, in ms; null when it names none. */
export function fragmentMs(fragment: string | null): number | null {
  const seconds = /^t=(\d+(?:\.\d+)?)$/.exec(fragment ?? '')?.[1];
  return seconds === undefined ? null : Math.round(Number(seconds) * 1000);
}

/** The fragment for an instant: `t=3.2`, exact to the millisecond and no longer than needed. */
export function momentFragment(atMs: number): string {
  return `t=${atMs / 1000}`;
}
