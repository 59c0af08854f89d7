import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The loading mark: a plumb line that swings until there is something to show. It hangs still on request. */
@Component({
  selector: 'mf-plumb',
  host: { role: 'status' },
  template: `
    <svg viewBox="0 0 48 56" width="48" height="56" aria-hidden="true" focusable="false">
      <path class="beam" d="M14 2h20" />
      <g class="swing">
        <path class="cord" d="M24 2v34" />
        <path class="weight" d="M19.5 35h9l-1.3 7-3.2 6-3.2-6Z" />
      </g>
    </svg>
    <span>{{ label() }}</span>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      align-items: center;
      gap: var(--mf-space-2);
      color: var(--mf-slate);
      font-size: var(--mf-text-s);
    }

    .beam,
    .cord {
      fill: none;
      stroke: currentcolor;
      stroke-width: 1.5;
      stroke-linecap: round;
    }

    .weight {
      fill: var(--mat-sys-primary);
    }

    .swing {
      transform-origin: 24px 2px;
      animation: mf-swing 1.6s ease-in-out infinite alternate;
    }

    @keyframes mf-swing {
      from {
        transform: rotate(14deg);
      }

      to {
        transform: rotate(-14deg);
      }
    }

    @media (prefers-reduced-motion: reduce) {
      .swing {
        animation: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Plumb {
  /** What is being waited for, in words. */
  readonly label = input('Loading');
}
