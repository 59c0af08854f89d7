import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { Snackbar } from './snackbar';

/** Where the snackbar's message shows; stands once in the application's root. */
@Component({
  selector: 'mf-snackbar-outlet',
  host: { role: 'status', 'aria-live': 'polite' },
  template: `
    @if (snackbar.current(); as snack) {
      <div
        class="snack"
        (pointerenter)="snackbar.hold()"
        (pointerleave)="snackbar.release()"
        (focusin)="snackbar.hold()"
        (focusout)="snackbar.release()"
      >
        <span>{{ snack.text }}</span>
        @if (snack.actionLabel) {
          <button type="button" class="act" (click)="snackbar.act()">{{ snack.actionLabel }}</button>
        }
        <button type="button" class="close" aria-label="Close this message" (click)="snackbar.dismiss()">
          ×
        </button>
      </div>
    }
  `,
  styles: `
    :host {
      position: fixed;
      inset: auto 0 calc(var(--mf-space-4) + var(--mf-bottom-bar, 0px)) 0;
      z-index: 900;
      display: flex;
      justify-content: center;
      padding: 0 var(--mf-space-4);
      pointer-events: none;
    }

    .snack {
      display: flex;
      align-items: center;
      gap: var(--mf-space-3);
      max-width: 560px;
      min-height: 48px;
      padding: 2px 4px 2px var(--mf-space-4);
      color: var(--mat-sys-inverse-on-surface);
      background: var(--mat-sys-inverse-surface);
      border-radius: var(--mf-radius-m);
      box-shadow: var(--mf-shadow-raised);
      pointer-events: auto;
    }

    button {
      min-width: var(--mf-target);
      min-height: var(--mf-target);
      padding: 0 var(--mf-space-2);
      background: none;
      border: 0;
      border-radius: var(--mf-radius-s);
    }

    button:focus-visible {
      outline-color: currentcolor;
      outline-offset: -4px;
    }

    .act {
      color: light-dark(#ff9a66, #b53a08);
      font-weight: 700;
    }

    .close {
      font-size: var(--mf-text-l);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SnackbarOutlet {
  protected readonly snackbar = inject(Snackbar);
}
