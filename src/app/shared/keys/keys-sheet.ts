import { ChangeDetectionStrategy, Component, computed, inject, type Signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogTitle,
} from '@angular/material/dialog';
import { KeyCap } from '../key-cap/key-cap';
import { Preferences } from '../preferences/preferences';
import type { KeyBinding } from './key-binding';
import { keyWords } from './key-rules';

/** The sheet of keys, made from the registry itself, with the switch that turns single keys off. */
@Component({
  selector: 'mf-keys-sheet',
  imports: [KeyCap, MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Keys</h2>
    <mat-dialog-content>
      <div class="groups">
        @for (group of groups(); track group.name) {
          <section>
            <h3>{{ group.name }}</h3>
            <dl>
              @for (binding of group.bindings; track binding.key) {
                <div>
                  <dt>
                    <kbd mf-key-cap>{{ words(binding) }}</kbd>
                  </dt>
                  <dd>{{ binding.label }}</dd>
                </div>
              }
            </dl>
          </section>
        }
      </div>
      <label class="mf-check">
        <input
          #single
          type="checkbox"
          [checked]="preferences.hasShortcuts()"
          (change)="preferences.switchShortcuts(single.checked)"
        />
        <span
          >Single keys act here. Without them, every act has its button, and Ctrl keys go on working.</span
        >
      </label>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="outlined" type="button" mat-dialog-close>Close</button>
    </mat-dialog-actions>
  `,
  styles: `
    .groups {
      columns: 2 280px;
      column-gap: var(--mf-space-6);
    }

    section {
      margin-bottom: var(--mf-space-4);
      break-inside: avoid;
    }

    dl {
      margin: var(--mf-space-2) 0 0;
    }

    dl > div {
      display: grid;
      grid-template-columns: 96px 1fr;
      align-items: center;
      gap: var(--mf-space-2);
      padding: 3px 0;
    }

    dd {
      margin: 0;
      font-size: var(--mf-text-s);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KeysSheet {
  protected readonly preferences = inject(Preferences);
  /** The registry's keys, given by whoever opens the sheet. */
  private readonly bindings = inject<Signal<readonly KeyBinding[]>>(MAT_DIALOG_DATA);

  protected readonly groups = computed(() => {
    const byName = new Map<string, KeyBinding[]>();
    for (const binding of this.bindings()) {
      byName.set(binding.group, [...(byName.get(binding.group) ?? []), binding]);
    }
    return [...byName].map(([name, bindings]) => ({ name, bindings }));
  });

  protected words(binding: KeyBinding): string {
    return keyWords(binding.key);
  }
}
