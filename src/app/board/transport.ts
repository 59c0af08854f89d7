import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MEASURE_KINDS, type MeasureKind } from '@contract';
import { Icon } from '../shared/icons/icon';
import { MEASURE_LABELS } from './measuring';
import { SPEEDS, type PlaybackClock } from './playback/playback-clock';

/** What the keys do, as buttons: playing, what lies over the picture, and measuring. */
@Component({
  selector: 'mf-transport',
  imports: [Icon],
  host: { role: 'toolbar', 'aria-label': 'Player' },
  template: `
    <button type="button" class="mf-icon-button" aria-label="One frame back" (click)="stepped.emit(-1)">
      <mf-icon name="skip-previous" />
    </button>
    <button
      type="button"
      class="mf-icon-button"
      [attr.aria-label]="clock().isPlaying() ? 'Pause' : 'Play'"
      (click)="clock().toggle()"
    >
      <mf-icon [name]="clock().isPlaying() ? 'pause' : 'play-arrow'" />
    </button>
    <button type="button" class="mf-icon-button" aria-label="One frame on" (click)="stepped.emit(1)">
      <mf-icon name="skip-next" />
    </button>
    <label>
      <span class="mf-visually-hidden">Speed</span>
      <select class="mf-input" (change)="setSpeed($event)">
        @for (speed of speeds; track speed) {
          <option [value]="speed" [selected]="clock().speed() === speed">{{ speed }}×</option>
        }
      </select>
    </label>
    <button type="button" class="tool" [attr.aria-pressed]="!!clock().loop()" (click)="loopTurned.emit()">
      repeat
    </button>
    <button type="button" class="tool" [attr.aria-pressed]="hasPlumb()" (click)="plumbTurned.emit()">
      plumb line
    </button>
    @if (besideNumber(); as number) {
      <button type="button" class="tool" [attr.aria-pressed]="showsBeside()" (click)="besideTurned.emit()">
        take {{ number }} beside
      </button>
    }
    @if (canWrite()) {
      <span class="between"></span>
      @for (kind of measureKinds; track kind) {
        <button
          type="button"
          class="tool"
          [attr.aria-pressed]="measuring() === kind"
          (click)="measured.emit(kind)"
        >
          {{ measureLabels[kind] }}
        </button>
      }
      <button type="button" class="tool" (click)="repMarked.emit('top')">rep top</button>
      <button type="button" class="tool" (click)="repMarked.emit('bottom')">rep bottom</button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: var(--mf-space-1) var(--mf-space-2);
    }

    select {
      min-height: 36px;
      padding-block: 0;
    }

    .tool {
      min-height: 36px;
      padding: 0 var(--mf-space-2);
      color: var(--mf-slate);
      background: none;
      border: 1px solid transparent;
      border-radius: var(--mf-radius-s);
      font-size: var(--mf-text-s);
      cursor: pointer;
    }

    .tool:hover {
      color: inherit;
    }

    .tool[aria-pressed='true'] {
      color: var(--mat-sys-on-surface);
      border-color: var(--mat-sys-primary);
    }

    .between {
      flex: 1;
    }

    @media (width < 900px) {
      .tool,
      select {
        min-height: var(--mf-target);
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Transport {
  readonly clock = input.required<PlaybackClock>();
  readonly hasPlumb = input(false);
  /** The number of the earlier take that can stand beside. */
  readonly besideNumber = input<number | null>(null);
  readonly showsBeside = input(false);
  readonly canWrite = input(false);
  /** The measure that is being taken. */
  readonly measuring = input<MeasureKind | null>(null);
  readonly stepped = output<number>();
  readonly loopTurned = output();
  readonly plumbTurned = output();
  readonly besideTurned = output();
  readonly measured = output<MeasureKind>();
  readonly repMarked = output<'top' | 'bottom'>();

  protected readonly speeds = SPEEDS;
  protected readonly measureKinds = MEASURE_KINDS;
  protected readonly measureLabels = MEASURE_LABELS;

  protected setSpeed(event: Event): void {
    const speed = SPEEDS.find((one) => String(one) === (event.target as HTMLSelectElement).value);
    if (speed) this.clock().setSpeed(speed);
  }
}
