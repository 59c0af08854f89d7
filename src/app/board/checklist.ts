import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { FaultDto, MarkDto } from '@contract';
import { KeyCap } from '../shared/key-cap/key-cap';
import { StateMark } from '../shared/marks/state-mark';
import { clipTime } from '../shared/times/time-words';
import { faultKey } from './board-words';

/** The faults of the lift with their marks, the last take's beside them; a press moves a mark on. */
@Component({
  selector: 'mf-checklist',
  imports: [KeyCap, StateMark],
  template: `
    <div class="head">
      <h2>What do you see?</h2>
      @if (lastNumber(); as number) {
        <span>now · take {{ number }}</span>
      }
    </div>
    <ul class="mf-list">
      @for (row of rows(); track row.fault.id) {
        <li>
          <button
            type="button"
            class="fault"
            [disabled]="isReadOnly()"
            [attr.aria-label]="row.label"
            (click)="pressed.emit(row.fault.id)"
          >
            @if (row.key) {
              <kbd mf-key-cap>{{ row.key }}</kbd>
            } @else {
              <span class="no-key"></span>
            }
            <mf-state-mark [mark]="row.mark?.mark ?? null" aria-hidden="true" />
            <span class="name">{{ row.fault.name }}</span>
          </button>
          @if (row.mark?.atMs; as atMs) {
            <button
              type="button"
              class="at mf-figures"
              [attr.aria-label]="'Go to ' + clipTime(atMs)"
              (click)="jumped.emit(row.mark)"
            >
              {{ clipTime(atMs) }}
            </button>
          }
          @if (lastNumber()) {
            <mf-state-mark class="last" [mark]="row.last" [sizePx]="13" />
          }
        </li>
      }
    </ul>
    @if (!isReadOnly() && hasUnmarked()) {
      <button type="button" class="mf-link-button" (click)="restCleared.emit()">Mark the rest clear</button>
    }
  `,
  styleUrl: './checklist.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Checklist {
  readonly faults = input.required<readonly FaultDto[]>();
  readonly marks = input.required<readonly MarkDto[]>();
  readonly lastMarks = input<readonly MarkDto[]>([]);
  /** The number of the take that `lastMarks` are of. */
  readonly lastNumber = input<number | null>(null);
  readonly isReadOnly = input(false);
  readonly pressed = output<string>();
  readonly jumped = output<MarkDto | undefined>();
  readonly restCleared = output();

  protected readonly clipTime = clipTime;
  protected readonly hasUnmarked = computed(() => this.rows().some((row) => !row.mark));
  protected readonly rows = computed(() =>
    this.faults().map((fault, index) => {
      const mark = this.marks().find((one) => one.faultId === fault.id);
      const words = mark ? mark.mark : 'not marked';
      return {
        fault,
        mark,
        key: faultKey(index),
        label: `${fault.name}, ${fault.phase}: ${words}`,
        last: this.lastMarks().find((one) => one.faultId === fault.id)?.mark ?? null,
      };
    }),
  );
}
