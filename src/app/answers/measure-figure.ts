import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { MeasureDto } from '@contract';
import { figureOf } from './measure-drawing';

/** A measure as a small drawing of its lines; the number and the words stand beside it. */
@Component({
  selector: 'mf-measure-figure',
  host: { 'aria-hidden': 'true' },
  template: `
    <svg viewBox="0 0 72 72" focusable="false">
      <path class="reference" [attr.d]="figure().reference" />
      <path class="line" [attr.d]="figure().line" />
      <path class="arc" [attr.d]="figure().arc" />
    </svg>
  `,
  styles: `
    :host {
      display: block;
      flex: none;
      width: 72px;
      height: 72px;
    }

    path {
      fill: none;
      stroke-linecap: round;
      stroke-linejoin: round;
    }

    .reference {
      stroke: var(--mat-sys-outline);
      stroke-width: 1.5;
      stroke-dasharray: 3 4;
    }

    .line {
      stroke: var(--mat-sys-primary);
      stroke-width: 3.5;
    }

    .arc {
      stroke: var(--mf-tape-mark);
      stroke-width: 2.5;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MeasureFigure {
  readonly measure = input.required<MeasureDto>();
  /** The displayed frame's size, pixels: fractions of it are no angles until they are multiplied by it. */
  readonly width = input.required<number>();
  readonly height = input.required<number>();

  protected readonly figure = computed(() =>
    figureOf(this.measure(), { width: this.width(), height: this.height() }),
  );
}
