import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { cadencePerMinute } from '@calc/tempo';
import type { RepMarks } from './board-api';

const seconds = (ms: number): string => (ms / 1000).toFixed(2);

/** Seconds down and up of each marked rep, and how many a minute. */
@Component({
  selector: 'mf-rep-table',
  template: `
    <div class="head">
      <h2>Tempo, rep by rep</h2>
      @if (asked(); as asked) {
        <span
          >asked: <span class="mf-figures">{{ asked }}</span></span
        >
      }
    </div>
    @if (marks().tempo.length > 0) {
      <table class="mf-table mf-figures">
        <thead>
          <tr>
            <th scope="col">rep</th>
            <th scope="col">down, s</th>
            <th scope="col">up, s</th>
          </tr>
        </thead>
        <tbody>
          @for (rep of marks().tempo; track rep.rep) {
            <tr>
              <th scope="row">{{ rep.rep }}</th>
              <td>{{ seconds(rep.downMs) }}</td>
              <td>{{ seconds(rep.upMs) }}</td>
            </tr>
          }
        </tbody>
      </table>
      @if (cadence(); as cadence) {
        <p class="mf-small mf-quiet">{{ cadence }} reps a minute</p>
      }
    } @else {
      <p class="mf-small mf-quiet">Mark the next top or bottom to close the first rep.</p>
    }
  `,
  styles: `
    .head {
      display: flex;
      justify-content: space-between;
      color: var(--mf-slate);
      font-size: var(--mf-text-s);
    }

    h2 {
      font-size: var(--mf-text-s);
    }

    table {
      width: 100%;
      font-size: var(--mf-text-s);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RepTable {
  readonly marks = input.required<RepMarks>();
  /** The tempo that was prescribed. */
  readonly asked = input<string | null>(null);

  protected readonly seconds = seconds;
  protected readonly cadence = computed(() => {
    const perMinute = cadencePerMinute(this.marks().tempo.map((rep) => rep.startMs));
    return perMinute === null ? null : perMinute.toFixed(0);
  });
}
