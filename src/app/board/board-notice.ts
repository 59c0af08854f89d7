import type { LeaseState } from './lease';

/** What the coach has to know before writing, and the one act that helps, if any. */
export interface Notice {
  readonly words: string;
  readonly act: 'pick-up' | 'wait' | null;
}

export const NOTICE_ACTS = { 'pick-up': 'Pick it up', wait: 'Take it when it is free' } as const;

/**
 * How the take stands for this coach; null while it is simply theirs.
 * @param closed why nobody can answer it, else null
 * @param wantsNext whether it is to be taken as soon as the other coach lets go
 */
export function noticeOf(closed: string | null, state: LeaseState, wantsNext: boolean): Notice | null {
  if (closed !== null) return { words: closed, act: null };
  switch (state.kind) {
    case 'taken':
      return wantsNext
        ? {
            words: `${state.by.name} is answering this take. You get it as soon as it is put back.`,
            act: null,
          }
        : { words: `${state.by.name} is answering this take. You can look, not write.`, act: 'wait' };
    case 'free':
      return { words: 'Nobody has this take now.', act: 'pick-up' };
    case 'lapsed':
      return {
        words: 'The server is out of reach, so your hold on this take ran out. What you write is kept here.',
        act: 'pick-up',
      };
    case 'failed':
      return { words: state.problem.detail, act: 'pick-up' };
    case 'asking':
    case 'held':
    case 'over':
      return null;
  }
}
