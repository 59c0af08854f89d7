import { afterNextRender, DOCUMENT, EnvironmentInjector, inject, Injectable } from '@angular/core';
import { NavigationEnd, Router } from '@angular/router';
import { filter, pairwise } from 'rxjs';

function pathOf(event: NavigationEnd): string {
  return event.urlAfterRedirects.split(/[?#]/)[0] ?? '';
}

/**
 * Moves focus to the new page's `h1` after each navigation, so that a keyboard or a screen reader starts at its top.
 * A change of the query or the fragment alone is no new page, and the first page keeps the browser's own focus.
 */
@Injectable({ providedIn: 'root' })
export class HeadingFocus {
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(EnvironmentInjector);

  constructor() {
    inject(Router)
      .events.pipe(
        filter((event) => event instanceof NavigationEnd),
        pairwise(),
        filter(([before, now]) => pathOf(before) !== pathOf(now)),
      )
      .subscribe(() => afterNextRender({ read: () => this.focusHeading() }, { injector: this.injector }));
  }

  private focusHeading(): void {
    // A page or a sheet that placed the focus itself (in its first field, say) is left alone.
    const active = this.document.activeElement;
    if (active?.closest('[role="dialog"]')) return;
    const heading = this.document.querySelector<HTMLElement>('h1');
    if (!heading) return;
    heading.tabIndex = -1;
    heading.focus({ preventScroll: true });
  }
}
