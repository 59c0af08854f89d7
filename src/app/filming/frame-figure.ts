import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** A line drawing of the picture that is wanted: an upright frame that holds the whole person, head to feet. */
@Component({
  selector: 'mf-frame-figure',
  host: { role: 'img', '[attr.aria-label]': 'label()' },
  template: `
    <svg viewBox="0 0 160 128" aria-hidden="true" focusable="false">
      <rect class="frame" x="47" y="6" width="66" height="116" rx="5" />
      <path class="edge" d="M55 20h50M55 110h50" />
      <g class="person">
        <circle cx="80" cy="31" r="7" />
        <path d="M70 43H90M72 43L73 69H87L88 43M73 69L69 107M87 69L91 107M69 107H63M91 107H97" />
        <path d="M70 43L76 68M90 43L84 68" />
        <path class="bell" d="M74 69h12l-2 10h-8Z" />
      </g>
    </svg>
  `,
  styles: `
    :host {
      display: block;
    }

    svg {
      display: block;
      width: 100%;
    }

    path,
    rect,
    circle {
      fill: none;
      stroke: currentcolor;
      stroke-linecap: round;
      stroke-linejoin: round;
    }

    .frame {
      stroke: var(--mf-ink);
      stroke-width: 2;
    }

    .edge {
      stroke: var(--mat-sys-outline);
      stroke-dasharray: 3 3;
    }

    .person {
      color: var(--mat-sys-primary);
      stroke-width: 2.4;
    }

    .bell {
      fill: var(--mat-sys-primary);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FrameFigure {
  /** What the drawing says, for screen readers. */
  readonly label = input.required<string>();
}
