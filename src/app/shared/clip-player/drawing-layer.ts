import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Drawing } from '@contract';
import { shapePath } from './shape-path';

/** A coach's drawing over a frame, in the frame's own coordinates, so that it stays in place at any size. */
@Component({
  selector: 'mf-drawing-layer',
  host: { 'aria-hidden': 'true' },
  template: `
    <svg
      [attr.viewBox]="'0 0 ' + width() + ' ' + height()"
      preserveAspectRatio="xMidYMid meet"
      focusable="false"
    >
      @for (path of paths(); track $index) {
        <path class="under" [attr.d]="path" />
        <path class="line" [attr.d]="path" />
      }
    </svg>
  `,
  styles: `
    :host {
      position: absolute;
      inset: 0;
      pointer-events: none;
    }

    svg {
      width: 100%;
      height: 100%;
    }

    path {
      fill: none;
      stroke-linecap: round;
      stroke-linejoin: round;
      vector-effect: non-scaling-stroke;
    }

    .under {
      stroke: rgb(14 18 17 / 70%);
      stroke-width: 8px;
    }

    .line {
      stroke: #ffab7a;
      stroke-width: 4px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DrawingLayer {
  readonly drawing = input.required<Drawing>();
  /** The displayed frame's size, pixels. */
  readonly width = input.required<number>();
  readonly height = input.required<number>();

  protected readonly paths = computed(() =>
    this.drawing().shapes.map((shape) => shapePath(shape, { width: this.width(), height: this.height() })),
  );
}
