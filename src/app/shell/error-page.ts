import { ChangeDetectionStrategy, Component, DOCUMENT, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { PageHeading } from '../shared/page-heading/page-heading';
import { Logo } from '../shared/plumb/logo';

/** Shown in place of a page that could not be reached or loaded; the address stays, so loading again tries again. */
@Component({
  selector: 'mf-error-page',
  imports: [Logo, MatButton, PageHeading],
  template: `
    <main class="mf-page mf-page-narrow mf-stack">
      <mf-logo [sizePx]="40" />
      <mf-page-heading
        heading="This page is out of reach"
        sub="The server did not answer, or a newer version has taken this one’s place. Nothing has been lost."
      />
      <button matButton="filled" type="button" (click)="reload()">Load it again</button>
    </main>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ErrorPage {
  private readonly document = inject(DOCUMENT);

  protected reload(): void {
    this.document.location.reload();
  }
}
