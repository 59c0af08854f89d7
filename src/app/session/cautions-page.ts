import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { PageHeading } from '../shared/page-heading/page-heading';
import { Logo } from '../shared/plumb/logo';
import { Cautions } from './cautions';
import { SessionStore } from './session-store';

/** When to stop and whom to ask; open to everybody. */
@Component({
  selector: 'mf-cautions-page',
  imports: [Cautions, Logo, PageHeading, RouterLink],
  template: `
    <main class="mf-page mf-page-narrow">
      <p class="mf-row"><mf-logo /> <a [routerLink]="store.home()">Back to Midfoot</a></p>
      <mf-page-heading heading="When to stop, and whom to ask" />
      <mf-cautions />
    </main>
  `,
  styles: `
    p {
      margin-bottom: var(--mf-space-5);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CautionsPage {
  protected readonly store = inject(SessionStore);
}
