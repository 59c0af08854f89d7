import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import type { MeasureDto } from '@contract';
import { Icon } from '../shared/icons/icon';
import { clipTime } from '../shared/times/time-words';
import { measuredWords } from './measuring';

/** What was measured; a press goes to its still. */
@Component({
  selector: 'mf-measure-list',
  imports: [Icon],
  template: `
    <h2>Measures</h2>
    <ul class="mf-list">
      @for (one of measures(); track one.id) {
        <li>
          <button type="button" class="mf-link-button" (click)="opened.emit(one)">
            {{ measuredWords(one) }} <span class="mf-figures">at {{ clipTime(one.atMs) }}</span>
          </button>
          @if (!isReadOnly()) {
            <button
              type="button"
              class="mf-icon-button"
              [attr.aria-label]="'Delete: ' + measuredWords(one)"
              (click)="deleted.emit(one)"
            >
              <mf-icon name="delete" [sizePx]="18" />
            </button>
          }
        </li>
      }
    </ul>
  `,
  styles: `
    h2 {
      color: var(--mf-slate);
      font-size: var(--mf-text-s);
    }

    ul > li {
      display: flex;
      align-items: center;
      justify-content: space-between;
      padding: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MeasureList {
  readonly measures = input.required<readonly MeasureDto[]>();
  readonly isReadOnly = input(false);
  readonly opened = output<MeasureDto>();
  readonly deleted = output<MeasureDto>();

  protected readonly measuredWords = measuredWords;
  protected readonly clipTime = clipTime;
}
