import { CdkTrapFocus } from '@angular/cdk/a11y';
import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  DOCUMENT,
  inject,
  input,
  output,
} from '@angular/core';
import { Icon } from '../icons/icon';

let count = 0;

/**
 * A form at the side of a list. Give it a route of its own, so that the address keeps the place:
 *
 *     <mf-side-sheet heading="Swing" [isDirty]="form.dirty" (closed)="goBack()">
 *       <form id="lift" …>…</form>
 *       <button sheetActs matButton="filled" type="submit" form="lift">Save</button>
 *     </mf-side-sheet>
 *
 * `closed` asks to leave; the route's `unsavedChangesGuard` puts the question about unsaved changes.
 */
@Component({
  selector: 'mf-side-sheet',
  imports: [CdkTrapFocus, Icon],
  host: {
    '(keydown.escape)': 'closed.emit()',
    '(window:beforeunload)': 'warnBeforeUnload($event)',
  },
  template: `
    <div class="backdrop" (click)="closed.emit()" aria-hidden="true"></div>
    <section
      role="dialog"
      aria-modal="true"
      [attr.aria-labelledby]="titleId"
      cdkTrapFocus
      cdkTrapFocusAutoCapture
    >
      <header>
        <h2 [id]="titleId">{{ heading() }}</h2>
        <button type="button" class="mf-icon-button" aria-label="Close" (click)="closed.emit()">
          <mf-icon name="close" />
        </button>
      </header>
      <div class="body"><ng-content /></div>
      <footer><ng-content select="[sheetActs]" /></footer>
    </section>
  `,
  styleUrl: './side-sheet.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SideSheet {
  readonly heading = input.required<string>();
  /** Whether there are changes that closing the window would lose. */
  readonly isDirty = input(false);
  /** The person asked to close the sheet. */
  readonly closed = output();

  protected readonly titleId = `mf-side-sheet-${++count}`;

  constructor() {
    const { body } = inject(DOCUMENT);
    // The page behind must not scroll under the sheet.
    body.style.overflow = 'hidden';
    inject(DestroyRef).onDestroy(() => (body.style.overflow = ''));
  }

  protected warnBeforeUnload(event: Event): void {
    if (this.isDirty()) event.preventDefault();
  }
}
