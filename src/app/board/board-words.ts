import { parseTempo } from '@calc/tempo';
import {
  PHASES,
  type Call,
  type CommentDto,
  type DraftAnswer,
  type FaultDto,
  type LiftDto,
  type Mark,
  type MarkDto,
  type Phase,
  type TakeState,
} from '@contract';
import type { NewAnswer } from './board-api';

export const CALL_LABELS: Readonly<Record<Call, string>> = {
  go: 'as planned',
  light: 'keep it light',
  scale: 'scale it',
};

/** The mark after one more press of a fault's key: seen, clear, hidden, then not marked again. */
export function nextMark(mark: Mark | null): Mark | null {
  switch (mark) {
    case null:
      return 'seen';
    case 'seen':
      return 'clear';
    case 'clear':
      return 'hidden';
    case 'hidden':
      return null;
  }
}

/** Marks with one fault's set, moved on or taken off. */
export function withMark(marks: readonly MarkDto[], faultId: string, set: MarkDto | null): MarkDto[] {
  const others = marks.filter((mark) => mark.faultId !== faultId);
  return set ? [...others, set] : others;
}

/** What still stands between the coach and sending, each as a sentence. */
export function missingWords(draft: DraftAnswer, lift: LiftDto): string[] {
  const missing: string[] = [];
  if (draft.topCue.trim() === '') missing.push('Write the one thing to change.');
  if (!draft.call) missing.push('Say what to do with the load.');
  if (draft.call === 'scale' && !lift.scales.some((scale) => scale.id === draft.scaleId)) {
    missing.push('Choose the scale to use.');
  }
  const tempo = draft.tempo?.trim() ?? '';
  if (tempo !== '' && !parseTempo(tempo)) {
    missing.push('Write the tempo as four counts, for instance 30X0 or 10-0-2-0.');
  }
  if (draft.refilm?.views.length === 0) missing.push('Choose the views to film again.');
  return missing;
}

/** The draft as an answer; null while something is missing. */
export function answerOf(draft: DraftAnswer, lift: LiftDto): NewAnswer | null {
  if (!draft.call || missingWords(draft, lift).length > 0) return null;
  const tempo = draft.tempo?.trim() ?? '';
  return {
    topCue: draft.topCue.trim(),
    call: draft.call,
    ...(draft.call === 'scale' ? { scaleId: draft.scaleId } : {}),
    ...(tempo === '' ? {} : { tempo }),
    ...(draft.refilm ? { refilm: draft.refilm } : {}),
  };
}

/** Why nobody can answer the take; null while it waits. */
export function closedWords(state: TakeState): string | null {
  switch (state) {
    case 'waiting':
    case 'picked-up':
      return null;
    case 'answered':
      return 'This take is answered. What was said stays as it is.';
    case 'processing':
      return 'The clips are being made ready. The take waits as soon as they play.';
    case 'unplayable':
      return 'A clip of this take cannot be played. The member was told what to do.';
    case 'withdrawn':
      return 'The member took this take back.';
    case 'draft':
      return 'This take was not handed in yet.';
  }
}

/** Above this many comments the board says that people change one thing at a time. */
export const MANY_COMMENTS = 3;

/** The digit that marks the n-th fault, from 0; none beyond the tenth. */
export function faultKey(index: number): string | null {
  return index < 9 ? String(index + 1) : index === 9 ? '0' : null;
}

/** Faults of one phase, in the order of the lift's list. */
export interface PhaseFaults {
  readonly phase: Phase;
  readonly faults: readonly FaultDto[];
}

/** The faults as the checklist shows and numbers them: by phase, in the order in which a rep goes through them. */
export function inPhases(faults: readonly FaultDto[]): PhaseFaults[] {
  return PHASES.map((phase) => ({ phase, faults: faults.filter((fault) => fault.phase === phase) })).filter(
    (group) => group.faults.length > 0,
  );
}

/**
 * The comment after (1) or before (-1) the open one, or, while none is open, after or before the instant that shows.
 * @param comments in order of time
 */
export function commentBeside(
  comments: readonly CommentDto[],
  openId: string | null,
  atMs: number,
  by: 1 | -1,
): CommentDto | undefined {
  const open = comments.findIndex((comment) => comment.id === openId);
  if (open >= 0) return comments[open + by];
  return by > 0
    ? comments.find((comment) => comment.atMs > atMs)
    : comments.filter((comment) => comment.atMs < atMs).at(-1);
}
