import { LiveAnnouncer } from '@angular/cdk/a11y';
import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  DOCUMENT,
  inject,
  Injector,
  input,
  output,
} from '@angular/core';
import { Icon } from '../shared/icons/icon';

/** One entry of an editable list, with buttons and keys (Alt with an arrow) to move it and a button to take it off. */
@Component({
  selector: 'mf-part-row',
  imports: [Icon],
  host: {
    role: 'group',
    '[attr.aria-label]': 'kind() + " " + (index() + 1) + " of " + count() + ": " + heading()',
    '(keydown.alt.arrowup)': 'move($event, -1)',
    '(keydown.alt.arrowdown)': 'move($event, 1)',
  },
  template: `
    <header>
      <h3>
        <span class="mf-figures">{{ index() + 1 }}</span> {{ heading() }}
      </h3>
      <button
        type="button"
        class="mf-icon-button up"
        [attr.aria-label]="'Move ' + heading() + ' up'"
        [attr.aria-disabled]="index() === 0"
        (click)="move($event, -1)"
      >
        <mf-icon name="arrow-back" [sizePx]="20" />
      </button>
      <button
        type="button"
        class="mf-icon-button down"
        [attr.aria-label]="'Move ' + heading() + ' down'"
        [attr.aria-disabled]="index() === count() - 1"
        (click)="move($event, 1)"
      >
        <mf-icon name="arrow-back" [sizePx]="20" />
      </button>
      <button
        type="button"
        class="mf-icon-button"
        [attr.aria-label]="'Take off ' + heading()"
        (click)="removed.emit()"
      >
        <mf-icon name="delete" [sizePx]="20" />
      </button>
    </header>
    <ng-content />
  `,
  styles: `
    :host {
      display: block;
      padding: var(--mf-space-2) var(--mf-space-4) var(--mf-space-4);
      background: var(--mf-paper);
      border: var(--mf-hairline);
      border-radius: var(--mf-radius-l);
    }

    :host(:focus-within) {
      border-color: var(--mat-sys-outline);
    }

    header {
      display: flex;
      align-items: center;
      margin-right: calc(-1 * var(--mf-space-2));
    }

    h3 {
      flex: 1;
      min-width: 0;
      overflow-wrap: anywhere;
    }

    h3 span {
      display: inline-block;
      min-width: 1.4em;
      color: var(--mf-slate);
    }

    .up mf-icon {
      rotate: 90deg;
    }

    .down mf-icon {
      rotate: -90deg;
    }

    [aria-disabled='true'] {
      opacity: 0.35;
      cursor: default;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PartRow {
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);
  private readonly announcer = inject(LiveAnnouncer);

  /** What each entry is: "Fault". */
  readonly kind = input.required<string>();
  /** What this one is called. */
  readonly heading = input.required<string>();
  readonly index = input.required<number>();
  readonly count = input.required<number>();
  /** The person wants it one place up (-1) or down (1). */
  readonly moved = output<-1 | 1>();
  readonly removed = output();

  protected move(event: Event, by: -1 | 1): void {
    event.preventDefault();
    const to = this.index() + by;
    if (to < 0 || to >= this.count()) return;
    const focused = this.document.activeElement;
    this.moved.emit(by);
    void this.announcer.announce(`${this.heading()} is now ${to + 1} of ${this.count()}.`);
    // An element that is put elsewhere loses the focus.
    afterNextRender(
      {
        read: () => {
          if (focused instanceof HTMLElement && this.document.activeElement !== focused) focused.focus();
        },
      },
      { injector: this.injector },
    );
  }
}
