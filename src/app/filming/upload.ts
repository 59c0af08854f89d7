import type { Problem } from '@contract';
import { withSample, type Sample } from './send-rate';
import type { Refusal } from './file-checks';

/** One choice of a file. The key stays with it through every try, so that the API keeps the clip once. */
export interface Chosen {
  file: File;
  key: string;
}

/** How the sending of one view stands in this browser; what has arrived is told by the take itself. */
export type Upload =
  | { kind: 'idle' }
  | { kind: 'checking'; chosen: Chosen }
  | { kind: 'refused'; name: string; refusal: Refusal }
  | {
      kind: 'sending';
      chosen: Chosen;
      sentBytes: number;
      totalBytes: number;
      samples: readonly Sample[];
      tries: number;
    }
  /** The network dropped: the file is kept, and sending begins again by itself. */
  | { kind: 'stopped'; chosen: Chosen; tries: number }
  /** The API refused the file, or failed. */
  | { kind: 'failed'; chosen: Chosen; problem: Problem };

export type UploadEvent =
  | { type: 'chosen'; chosen: Chosen }
  | { type: 'refused'; refusal: Refusal }
  | { type: 'started' }
  | { type: 'progressed'; sentBytes: number; totalBytes: number; atMs: number }
  | { type: 'dropped' }
  | { type: 'failed'; problem: Problem }
  | { type: 'arrived' }
  | { type: 'cancelled' };

export const IDLE: Upload = { kind: 'idle' };

/** Statuses of a broken way to the server, not of its judgement: none at all, a timeout, a gateway's. */
const BROKEN_WAY: readonly number[] = [0, 408, 502, 503, 504];

/** Whether a failed try is worth repeating with the same file. */
export function isDrop(problem: Problem): boolean {
  return BROKEN_WAY.includes(problem.status);
}

/** The wait before the next try, ms: 2 s, doubled with each try up to half a minute. */
export function retryWaitMs(tries: number): number {
  return Math.min(30_000, 2_000 * 2 ** Math.max(0, tries - 1));
}

function started(state: Upload): Upload {
  if (state.kind !== 'checking' && state.kind !== 'stopped' && state.kind !== 'failed') return state;
  const { chosen } = state;
  const tries = state.kind === 'stopped' ? state.tries + 1 : 1;
  return { kind: 'sending', chosen, sentBytes: 0, totalBytes: chosen.file.size, samples: [], tries };
}

/** The next state. An event that does not belong to the present state (a late one, say) changes nothing. */
export function nextUpload(state: Upload, event: UploadEvent): Upload {
  switch (event.type) {
    case 'chosen':
      return { kind: 'checking', chosen: event.chosen };
    case 'cancelled':
    case 'arrived':
      return IDLE;
    case 'refused':
      return state.kind === 'checking'
        ? { kind: 'refused', name: state.chosen.file.name, refusal: event.refusal }
        : state;
    case 'started':
      return started(state);
    case 'progressed': {
      if (state.kind !== 'sending') return state;
      const { sentBytes, totalBytes, atMs } = event;
      return { ...state, sentBytes, totalBytes, samples: withSample(state.samples, { atMs, sentBytes }) };
    }
    case 'dropped':
      return state.kind === 'sending' ? { kind: 'stopped', chosen: state.chosen, tries: state.tries } : state;
    case 'failed':
      return state.kind === 'sending'
        ? { kind: 'failed', chosen: state.chosen, problem: event.problem }
        : state;
  }
}

/** Whether leaving the page now would lose the sending. */
export function isUnderWay(state: Upload): boolean {
  return state.kind === 'checking' || state.kind === 'sending' || state.kind === 'stopped';
}
