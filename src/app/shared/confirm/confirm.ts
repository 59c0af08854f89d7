import { inject, Injectable, Injector } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import type { Question } from './question';

/** Asks before what cannot be undone. The dialog's code is fetched with the first question. */
@Injectable({ providedIn: 'root' })
export class Confirm {
  private readonly injector = inject(Injector);

  /** @returns whether the person chose to go ahead; closing the dialog means no. */
  async ask(question: Question): Promise<boolean> {
    const [{ MatDialog }, { ConfirmDialog }] = await Promise.all([
      import('@angular/material/dialog'),
      import('./confirm-dialog'),
    ]);
    const dialog = this.injector.get(MatDialog).open(ConfirmDialog, {
      data: question,
      role: 'alertdialog',
      width: '440px',
      // The answer that changes nothing stands first and takes the focus.
      autoFocus: 'first-tabbable',
    });
    return (await firstValueFrom(dialog.afterClosed())) === true;
  }

  /** Asks whether to leave a form whose changes have not been saved. */
  discardChanges(): Promise<boolean> {
    return this.ask({
      heading: 'Leave without saving?',
      body: 'What you changed here has not been saved.',
      confirmLabel: 'Discard changes',
      cancelLabel: 'Keep editing',
    });
  }
}
