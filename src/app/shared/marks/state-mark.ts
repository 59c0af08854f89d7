import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** The state of a fault on a take; null while nobody has marked it. */
export type ShownMark = 'seen' | 'clear' | 'hidden' | null;

const WORDS = { seen: 'seen', clear: 'clear', hidden: 'hidden: this view cannot show it' } as const;

/** A mark as a shape: a hollow ring is seen, a filled dot is clear, a dash is hidden, a dotted circle not marked. */
@Component({
  selector: 'mf-state-mark',
  host: { role: 'img', '[attr.aria-label]': 'words()', '[title]': 'words()' },
  template: `
    <svg
      viewBox="0 0 16 16"
      [attr.width]="sizePx()"
      [attr.height]="sizePx()"
      aria-hidden="true"
      focusable="false"
    >
      @switch (mark()) {
        @case ('seen') {
          <circle class="seen" cx="8" cy="8" r="5.6" />
        }
        @case ('clear') {
          <circle class="clear" cx="8" cy="8" r="6.4" />
        }
        @case ('hidden') {
          <path class="hidden" d="M2 8h12" />
        }
        @default {
          <circle class="unmarked" cx="8" cy="8" r="6" />
        }
      }
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
      vertical-align: middle;
    }

    circle,
    path {
      fill: none;
      stroke-width: 2.2;
    }

    .seen {
      stroke: var(--mf-seen);
    }

    .clear {
      fill: var(--mf-clear);
    }

    .hidden {
      stroke: var(--mf-hidden);
      stroke-width: 2.6;
    }

    .unmarked {
      stroke: var(--mat-sys-outline);
      stroke-width: 1.4;
      stroke-dasharray: 2 2.2;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StateMark {
  readonly mark = input.required<ShownMark>();
  /** Width and height in CSS pixels. */
  readonly sizePx = input(16);

  protected readonly words = computed(() => {
    const mark = this.mark();
    return mark === null ? 'not marked' : WORDS[mark];
  });
}
