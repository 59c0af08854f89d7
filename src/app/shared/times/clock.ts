import { DestroyRef, DOCUMENT, inject, Injectable, signal } from '@angular/core';

const TICK_MS = 15_000;

/** The present as a signal (epoch milliseconds), fresh every 15 s and whenever the page comes back into view. */
@Injectable({ providedIn: 'root' })
export class Clock {
  readonly nowMs = signal(Date.now());

  constructor() {
    const document = inject(DOCUMENT);
    const tick = (): void => {
      if (!document.hidden) this.nowMs.set(Date.now());
    };
    const timer = setInterval(tick, TICK_MS);
    document.addEventListener('visibilitychange', tick);
    inject(DestroyRef).onDestroy(() => {
      clearInterval(timer);
      document.removeEventListener('visibilitychange', tick);
    });
  }
}
