import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { scaleLinear } from 'd3-scale';
import { area, curveStepAfter, line } from 'd3-shape';
import type { TurnaroundDto } from '@contract';
import { curveEndHours, curveWords } from './turnaround-words';

const WIDTH = 640;
const HEIGHT = 240;
const LEFT = 60;
const RIGHT = 26;
const TOP = 12;
const BOTTOM = 40;

interface Point {
  hours: number;
  share: number;
  low: number;
  high: number;
}

/** The share of takes that has an answer, by hours since it was sent, with its limits; a table beside says the same. */
@Component({
  selector: 'mf-waiting-curve',
  template: `
    <svg [attr.viewBox]="'0 0 ' + width + ' ' + height" role="img" [attr.aria-label]="words()">
      @for (tick of shares(); track tick.label) {
        <line class="grid" [attr.x1]="left" [attr.x2]="end" [attr.y1]="tick.at" [attr.y2]="tick.at" />
        <text class="share" [attr.x]="left - 6" [attr.y]="tick.at + 4">{{ tick.label }}</text>
      }
      @for (tick of hours(); track tick.label) {
        <text class="hour" [attr.x]="tick.at" [attr.y]="height - 12">{{ tick.label }}</text>
      }
      <path class="limits" [attr.d]="band()" />
      <path class="curve" [attr.d]="path()" />
      @if (middle(); as middle) {
        <path class="middle" [attr.d]="middle.path" />
        <circle class="bob" r="5" [attr.cx]="middle.x" [attr.cy]="middle.y" />
      }
    </svg>
  `,
  styles: `
    svg {
      display: block;
      width: 100%;
      max-width: 760px;
    }

    .grid {
      stroke: var(--mf-mist);
    }

    text {
      fill: var(--mf-slate);
      font: 600 13px/1 var(--mf-font-figures);
    }

    .share {
      text-anchor: end;
    }

    .hour {
      text-anchor: middle;
    }

    .limits {
      fill: var(--mf-spruce);
      opacity: 0.14;
    }

    .curve {
      fill: none;
      stroke: var(--mf-spruce);
      stroke-width: 2.5;
      stroke-linejoin: round;
    }

    .middle {
      fill: none;
      stroke: var(--mf-ink);
      stroke-width: 1.2;
    }

    .bob {
      fill: var(--mf-ink);
    }

    /* The drawing shrinks with the window; its figures must not. */
    @media (width < 700px) {
      text {
        font-size: 22px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WaitingCurve {
  readonly curve = input.required<TurnaroundDto['curve']>();
  /** Hours within which half were answered; null where not reached. */
  readonly medianHours = input.required<number | null>();

  protected readonly width = WIDTH;
  protected readonly height = HEIGHT;
  protected readonly left = LEFT;
  protected readonly end = WIDTH - RIGHT;
  protected readonly words = computed(() => curveWords(this.curve()));
  private readonly x = computed(() =>
    scaleLinear([0, curveEndHours(this.curve())], [LEFT, WIDTH - RIGHT]).nice(5),
  );
  private readonly y = scaleLinear([0, 1], [HEIGHT - BOTTOM, TOP]);
  private readonly points = computed<Point[]>(() => {
    const steps = this.curve().map(({ hours, waitingShare, low, high }) => ({
      hours,
      share: 1 - waitingShare,
      low: 1 - (high ?? waitingShare),
      high: 1 - (low ?? waitingShare),
    }));
    return [{ hours: 0, share: 0, low: 0, high: 0 }, ...steps];
  });

  protected readonly path = computed(() =>
    line<Point>(
      (point) => this.x()(point.hours),
      (point) => this.y(point.share),
    ).curve(curveStepAfter)(this.points()),
  );
  protected readonly band = computed(() =>
    area<Point>()
      .x((point) => this.x()(point.hours))
      .y0((point) => this.y(point.low))
      .y1((point) => this.y(point.high))
      .curve(curveStepAfter)(this.points()),
  );
  /** A plumb line from the half down to its hour. */
  protected readonly middle = computed(() => {
    const hours = this.medianHours();
    if (hours === null) return null;
    const x = this.x()(hours);
    const y = this.y(0);
    return { x, y, path: `M${LEFT} ${this.y(0.5)}H${x}V${y}` };
  });
  protected readonly shares = computed(() =>
    [0, 0.25, 0.5, 0.75, 1].map((share) => ({ at: this.y(share), label: `${share * 100} %` })),
  );
  protected readonly hours = computed(() =>
    this.x()
      .ticks(5)
      .map((hours) => ({ at: this.x()(hours), label: `${hours} h` })),
  );
}
