import { inject, Injectable } from '@angular/core';
import type { DraftAnswer } from '@contract';
import { SessionStore } from '../session/session-store';

/** A draft that nothing was written into yet. */
export const EMPTY_DRAFT: DraftAnswer = { topCue: '', composer: '' };

const PREFIX = 'midfoot.draft';

function isDraft(value: unknown): value is DraftAnswer {
  return (
    typeof value === 'object' &&
    value !== null &&
    'topCue' in value &&
    typeof value.topCue === 'string' &&
    'composer' in value &&
    typeof value.composer === 'string'
  );
}

/**
 * What a coach wrote and the server has not confirmed yet, kept in the browser: it outlives a reload and a session
 * that ended in the middle. Taken away as soon as the server has it. Each person's own.
 */
@Injectable()
export class DraftMirror {
  private readonly session = inject(SessionStore);

  read(takeId: string): DraftAnswer | null {
    const text = localStorage.getItem(this.key(takeId));
    if (text === null) return null;
    try {
      const value: unknown = JSON.parse(text);
      return isDraft(value) ? value : null;
    } catch {
      // Written by another version or cut off; the server's draft stands.
      return null;
    }
  }

  keep(takeId: string, draft: DraftAnswer): void {
    try {
      localStorage.setItem(this.key(takeId), JSON.stringify(draft));
    } catch {
      // A browser without room still sends the draft to the server a moment later.
    }
  }

  forget(takeId: string): void {
    localStorage.removeItem(this.key(takeId));
  }

  private key(takeId: string): string {
    return `${PREFIX}.${this.session.user()?.id ?? ''}.${takeId}`;
  }
}
