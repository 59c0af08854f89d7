import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** The outline of what is being loaded. It appears after 200 ms, so that a quick answer shows no flicker. */
@Component({
  selector: 'mf-skeleton',
  host: { role: 'status', 'aria-label': 'Loading' },
  template: `
    @for (part of parts(); track part) {
      <span [class]="shape()"></span>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: var(--mf-space-3);
      animation: mf-appear 0.2s 0.2s both;
    }

    span {
      display: block;
      background: linear-gradient(100deg, var(--mf-mist) 40%, var(--mf-paper) 50%, var(--mf-mist) 60%) 100%
        0 / 300% 100%;
      border-radius: var(--mf-radius-m);
      animation: mf-sheen 1.8s linear infinite;
    }

    .line {
      height: 16px;
    }

    .line:last-child {
      width: 60%;
    }

    .row {
      height: 72px;
    }

    .card {
      height: 240px;
      border-radius: var(--mf-radius-l);
    }

    @keyframes mf-appear {
      from {
        opacity: 0;
      }
    }

    @keyframes mf-sheen {
      to {
        background-position: 0 0;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Skeleton {
  /** What is to come: lines of text, rows of a list, or cards. */
  readonly shape = input<'line' | 'row' | 'card'>('line');
  readonly count = input(3);

  protected readonly parts = computed(() => Array.from({ length: this.count() }, (_part, index) => index));
}
