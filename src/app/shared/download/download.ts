import { DOCUMENT, inject, Injectable } from '@angular/core';
import { SessionStore } from '../../session/session-store';
import { problemOf } from '../problems/problem';
import { Snackbar } from '../snackbar/snackbar';

/**
 * Saves a file that the server makes. A plain link cannot renew a session that has just run out, and would save the
 * refusal in the file's place; so the session is looked at first.
 */
@Injectable({ providedIn: 'root' })
export class Download {
  private readonly document = inject(DOCUMENT);
  private readonly session = inject(SessionStore);
  private readonly snackbar = inject(Snackbar);

  async save(url: string): Promise<void> {
    try {
      if ((await this.session.check()) !== 'signed-in') return;
    } catch (error) {
      this.snackbar.say(problemOf(error).detail);
      return;
    }
    const link = this.document.createElement('a');
    link.href = url;
    link.download = '';
    link.click();
  }
}
