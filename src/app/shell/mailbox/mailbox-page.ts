import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { DomSanitizer } from '@angular/platform-browser';
import { firstValueFrom } from 'rxjs';
import type { MailboxDto, MailDto } from '@contract';
import { EmptyState } from '../../shared/empty-state/empty-state';
import { PageHeading } from '../../shared/page-heading/page-heading';
import { Plumb } from '../../shared/plumb/plumb';
import { ProblemBox } from '../../shared/problems/problem-box';
import { problemOf, type Problem } from '../../shared/problems/problem';
import { AbsoluteTime } from '../../shared/times/absolute-time';

/** What the demo's mail service received. A mail's links open in this window. */
@Component({
  selector: 'mf-mailbox-page',
  imports: [AbsoluteTime, EmptyState, PageHeading, Plumb, ProblemBox],
  templateUrl: './mailbox-page.html',
  styleUrl: './mailbox-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MailboxPage {
  private readonly http = inject(HttpClient);
  private readonly sanitizer = inject(DomSanitizer);

  protected readonly mails = signal<readonly MailDto[] | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  protected readonly openIndex = signal(0);
  protected readonly open = computed(() => this.mails()?.[this.openIndex()] ?? null);
  /** The frame is sandboxed without scripts, so the mail's own HTML can be handed to it as it is. */
  protected readonly body = computed(() => {
    const html = this.open()?.html;
    return html ? this.sanitizer.bypassSecurityTrustHtml(`<base target="_top">${html}`) : null;
  });
  protected readonly heading = computed(() => {
    const count = this.mails()?.length;
    if (count === undefined) return 'Mailbox';
    return count === 1 ? 'One mail has been sent' : `${count} mails have been sent`;
  });

  constructor() {
    void this.load();
  }

  protected async load(): Promise<void> {
    try {
      this.mails.set((await firstValueFrom(this.http.get<MailboxDto>('/api/dev/mailbox'))).items);
      this.problem.set(null);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }
}
