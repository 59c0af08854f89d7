import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The head of a page: a sentence as `h1` that says how things stand, a quieter one under it, acts at its side. */
@Component({
  selector: 'mf-page-heading',
  template: `
    <div>
      <h1 tabindex="-1">{{ heading() }}</h1>
      @if (sub(); as sub) {
        <p>{{ sub }}</p>
      }
    </div>
    <div class="acts"><ng-content /></div>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: flex-start;
      justify-content: space-between;
      gap: var(--mf-space-3);
      margin-bottom: var(--mf-space-4);
    }

    p {
      margin-top: var(--mf-space-2);
      color: var(--mf-slate);
    }

    .acts {
      display: flex;
      flex-wrap: wrap;
      gap: var(--mf-space-2);
    }

    .acts:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PageHeading {
  /** The sentence, for instance "Five clips wait. One says it hurts." */
  readonly heading = input.required<string>();
  /** What stands under it. */
  readonly sub = input<string>();
}
