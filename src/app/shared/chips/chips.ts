import { ChangeDetectionStrategy, Component, input, model } from '@angular/core';

/** One choice of a row of chips. */
export interface ChipOption {
  value: string;
  label: string;
  /** How many there are, shown after the label. */
  count?: number;
}

/** A row of pills of which one is chosen, for filters: `<mf-chips label="Show" [options]="…" [(value)]="filter" />`. */
@Component({
  selector: 'mf-chips',
  host: { role: 'group', '[attr.aria-label]': 'label()' },
  template: `
    @for (option of options(); track option.value) {
      <button type="button" [attr.aria-pressed]="option.value === value()" (click)="value.set(option.value)">
        {{ option.label }}
        @if (option.count !== undefined) {
          <span class="mf-figures">{{ option.count }}</span>
        }
      </button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: var(--mf-space-2);
    }

    button {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      min-height: 36px;
      padding: 0 14px;
      background: transparent;
      border: 1px solid var(--mf-mist);
      border-radius: var(--mf-radius-pill);
      font-size: var(--mf-text-s);
      font-weight: 600;
    }

    button:hover {
      border-color: var(--mat-sys-outline);
    }

    button[aria-pressed='true'] {
      color: var(--mat-sys-on-primary);
      background: var(--mat-sys-primary);
      border-color: var(--mat-sys-primary);
    }

    span {
      opacity: 0.8;
    }

    @media (width < 700px) {
      button {
        min-height: var(--mf-target);
        padding: 0 18px;
        font-size: var(--mf-text-m);
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Chips {
  /** What the row chooses, for screen readers. */
  readonly label = input.required<string>();
  readonly options = input.required<readonly ChipOption[]>();
  /** The chosen option's value. */
  readonly value = model.required<string>();
}
