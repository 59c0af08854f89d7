import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { SessionStore } from '../session/session-store';
import { PageHeading } from '../shared/page-heading/page-heading';

/** An address that leads nowhere. */
@Component({
  selector: 'mf-not-found-page',
  imports: [MatButton, PageHeading, RouterLink],
  template: `
    <div class="mf-page">
      <mf-page-heading
        heading="There is nothing at this address"
        sub="It may have been mistyped, or what was here has been withdrawn."
      />
      <a matButton="filled" [routerLink]="store.home()">Go to your first room</a>
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotFoundPage {
  protected readonly store = inject(SessionStore);
}
