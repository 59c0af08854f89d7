import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The sign of the house: a plumb line whose weight falls on the middle of a foot seen from the side. */
@Component({
  selector: 'mf-logo',
  template: `
    <svg
      viewBox="0 0 32 32"
      [attr.width]="sizePx()"
      [attr.height]="sizePx()"
      aria-hidden="true"
      focusable="false"
    >
      <path
        class="foot"
        d="M4.5 28.5c-.6-2.3-.2-4.3 1.3-5.8 2.2 1.2 4 1.2 5.8.2 3.6 2 8 2.5 12 3 2.6.3 4.1 1.1 4.4 2.6Z"
      />
      <path class="line" d="M15.8 1.5V13" />
      <path class="weight" d="M12.6 12.5h6.4l-.9 4.6-2.3 4.4-2.3-4.4Z" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      color: var(--mat-sys-primary);
    }

    .foot,
    .line {
      fill: none;
      stroke: currentcolor;
      stroke-width: 1.9;
      stroke-linecap: round;
      stroke-linejoin: round;
    }

    .weight {
      fill: currentcolor;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Logo {
  /** Width and height in CSS pixels. */
  readonly sizePx = input(32);
}
