import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { FaultDto, MarkDto } from '@contract';
import { KeyCap } from '../shared/key-cap/key-cap';
import { StateMark } from '../shared/marks/state-mark';
import { clipTime } from '../shared/times/time-words';
import { faultKey, inPhases } from './board-words';

/** The faults of the lift by phase, with their marks, the last take's beside them; a press moves a mark on. */
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
    @for (group of groups(); track group.phase) {
      <h3 [id]="'phase-' + group.phase">{{ group.phase }}</h3>
      <ul class="mf-list" [attr.aria-labelledby]="'phase-' + group.phase">
        @for (row of group.rows; track row.fault.id) {
          <li>
            <button
              type="button"
              class="fault"
              [disabled]="isReadOnly()"
              [attr.aria-keyshortcuts]="row.key"
              (click)="pressed.emit(row.fault.id)"
            >
              @if (row.key) {
                <kbd mf-key-cap aria-hidden="true">{{ row.key }}</kbd>
              } @else {
                <span class="no-key"></span>
              }
              <mf-state-mark [mark]="row.mark?.mark ?? null" aria-hidden="true" />
              <span class="name" aria-hidden="true">{{ row.fault.name }}</span>
              <span class="mf-visually-hidden">{{ row.spoken }}</span>
            </button>
            @if (row.at) {
              <button
                type="button"
                class="at mf-figures"
                [attr.aria-label]="'Go to ' + row.at"
                (click)="jumped.emit(row.mark)"
              >
                {{ row.at }}
              </button>
            }
            @if (lastNumber()) {
              <mf-state-mark class="last" [mark]="row.last" [sizePx]="13" />
            }
          </li>
        }
      </ul>
    }
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

  protected readonly hasUnmarked = computed(() =>
    this.faults().some((fault) => !this.marks().some((mark) => mark.faultId === fault.id)),
  );
  protected readonly groups = computed(() => {
    let count = 0;
    return inPhases(this.faults()).map(({ phase, faults }) => ({
      phase,
      rows: faults.map((fault) => this.rowOf(fault, count++)),
    }));
  });

  private rowOf(fault: FaultDto, index: number) {
    const mark = this.marks().find((one) => one.faultId === fault.id);
    const words = mark ? mark.mark : 'not marked';
    return {
      fault,
      mark,
      at: mark && mark.atMs !== null ? clipTime(mark.atMs) : null,
      key: faultKey(index),
      /** The name with what the heading and the shape say. */
      spoken: `${fault.name}, ${fault.phase}: ${words}`,
      last: this.lastMarks().find((one) => one.faultId === fault.id)?.mark ?? null,
    };
  }
}
