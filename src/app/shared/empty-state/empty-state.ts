import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { Icon } from '../icons/icon';
import type { IconName } from '../icons/icon-set';

/** What stands where nothing is yet: a heading, a sentence on what to do next, and the act itself as content. */
@Component({
  selector: 'mf-empty-state',
  imports: [Icon],
  template: `
    <mf-icon [name]="icon()" [sizePx]="32" />
    <h2>{{ heading() }}</h2>
    <div><ng-content /></div>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      align-items: flex-start;
      gap: var(--mf-space-2);
      padding: var(--mf-space-6) var(--mf-space-5);
      border: 1.5px dashed var(--mat-sys-outline-variant);
      border-radius: var(--mf-radius-l);
    }

    mf-icon {
      color: var(--mat-sys-primary);
    }

    div {
      max-width: var(--mf-line-length);
      color: var(--mf-slate);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmptyState {
  readonly icon = input.required<IconName>();
  readonly heading = input.required<string>();
}
