import { ChangeDetectionStrategy, Component } from '@angular/core';

/** A key of the keyboard: `<kbd mf-key-cap>Enter</kbd>`. */
@Component({
  selector: 'kbd[mf-key-cap]',
  template: `<ng-content />`,
  styles: `
    :host {
      display: inline-grid;
      place-items: center;
      min-width: 24px;
      padding: 2px 6px;
      color: var(--mf-slate);
      border: 1px solid var(--mat-sys-outline);
      border-radius: var(--mf-radius-s);
      font: 600 var(--mf-text-xs) / 1.3 var(--mf-font-figures);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KeyCap {}
