import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { Icon } from '../icons/icon';
import type { Problem } from './problem';

/** What is wrong and what to do, as a box that screen readers announce; shows nothing while there is no problem. */
@Component({
  selector: 'mf-problem-box',
  imports: [Icon],
  template: `
    <div role="alert">
      @if (problem(); as problem) {
        <div class="box">
          <mf-icon name="error" />
          <div>
            <strong>{{ problem.title }}</strong>
            @if (problem.detail && problem.detail !== problem.title) {
              <p>{{ problem.detail }}</p>
            }
            @if (problem.errors?.length) {
              <ul>
                @for (error of problem.errors; track $index) {
                  <li>{{ error.message }}</li>
                }
              </ul>
            }
            <ng-content />
          </div>
        </div>
      }
    </div>
  `,
  styles: `
    .box {
      display: flex;
      gap: var(--mf-space-3);
      padding: var(--mf-space-3) var(--mf-space-4);
      color: var(--mat-sys-on-error-container);
      background: var(--mat-sys-error-container);
      border-radius: var(--mf-radius-m);
    }

    ul {
      margin: var(--mf-space-1) 0 0;
      padding-left: 1.2em;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProblemBox {
  /** The problem to show, or nothing. */
  readonly problem = input<Problem | null>(null);
}
