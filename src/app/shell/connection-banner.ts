import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  DOCUMENT,
  inject,
  signal,
} from '@angular/core';
import { LiveEvents } from './live-events';

/** Says that the network or the live line is gone, and that both come back by themselves. */
@Component({
  selector: 'mf-connection-banner',
  host: { role: 'status' },
  template: `
    @if (words(); as words) {
      <p>{{ words }}</p>
    }
  `,
  styles: `
    p {
      max-width: none;
      padding: var(--mf-space-2) var(--mf-space-4);
      color: #f6f4ee;
      background: var(--mf-rubber);
      border-bottom: 2px solid var(--mf-tape-mark);
      font-size: var(--mf-text-s);
      text-align: center;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConnectionBanner {
  private readonly live = inject(LiveEvents);
  private readonly isOnline = signal(navigator.onLine);

  protected readonly words = computed(() => {
    if (!this.isOnline())
      return 'You are offline. What you see may be old; uploads go on when the network returns.';
    if (this.live.state() === 'reconnecting') return 'Connecting again … what you see may be a little old.';
    return null;
  });

  constructor() {
    const view = inject(DOCUMENT).defaultView;
    const update = (): void => this.isOnline.set(navigator.onLine);
    view?.addEventListener('online', update);
    view?.addEventListener('offline', update);
    inject(DestroyRef).onDestroy(() => {
      view?.removeEventListener('online', update);
      view?.removeEventListener('offline', update);
    });
  }
}
