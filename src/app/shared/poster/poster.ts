import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { Icon } from '../icons/icon';

/** A clip's still, upright. Without one (not made yet, or gone) the place keeps its shape and says so by a drawing. */
@Component({
  selector: 'mf-poster',
  imports: [Icon],
  template: `
    @if (shown(); as src) {
      <img [src]="src" [alt]="alt()" loading="lazy" decoding="async" (error)="broken.set(src)" />
    } @else {
      <span class="nothing" role="img" [attr.aria-label]="alt() + ' (no picture)'"
        ><mf-icon name="videocam"
      /></span>
    }
    <ng-content />
  `,
  styles: `
    :host {
      position: relative;
      display: block;
      overflow: hidden;
      aspect-ratio: 3 / 5;
      background: light-dark(#d9d8cf, #2c3335);
      border-radius: var(--mf-radius-m);
    }

    img {
      display: block;
      width: 100%;
      height: 100%;
      object-fit: cover;
    }

    .nothing {
      display: grid;
      place-items: center;
      height: 100%;
      color: var(--mf-slate);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Poster {
  /** The still's address, or null while there is none. */
  readonly src = input.required<string | null>();
  /** Who and which view, for instance "Amara Holmqvist, side". */
  readonly alt = input.required<string>();

  protected readonly broken = signal<string | null>(null);
  protected readonly shown = computed(() => (this.src() === this.broken() ? null : this.src()));
}
