import { ChangeDetectionStrategy, Component, DestroyRef, inject, input, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { SessionApi, type DemoAccount } from './session-api';

/** In the demo, one row of buttons that sign in as each of its people; nothing anywhere else. */
@Component({
  selector: 'mf-demo-accounts',
  template: `
    @if (accounts().length > 0) {
      <section aria-labelledby="mf-demo-title">
        <h2 id="mf-demo-title">This is the demo. Walk in as</h2>
        <div class="people">
          @for (account of accounts(); track account.email) {
            <button type="button" [disabled]="isBusy()" (click)="chosen.emit(account)">
              <strong>{{ account.name }}</strong>
              <span>{{ account.role }}</span>
            </button>
          }
        </div>
      </section>
    }
  `,
  styles: `
    section {
      padding-top: var(--mf-space-4);
      border-top: var(--mf-hairline);
    }

    h2 {
      margin-bottom: var(--mf-space-2);
      color: var(--mf-slate);
      font-size: var(--mf-text-m);
      font-weight: 600;
    }

    .people {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(128px, 1fr));
      gap: var(--mf-space-2);
    }

    button {
      display: flex;
      flex-direction: column;
      align-items: flex-start;
      min-height: 56px;
      padding: var(--mf-space-2) var(--mf-space-3);
      text-align: start;
      line-height: 1.3;
      background: var(--mf-paper);
      border: 1px solid var(--mat-sys-outline);
      border-radius: var(--mf-radius-m);
    }

    button:hover:enabled {
      border-color: var(--mat-sys-primary);
    }

    span {
      color: var(--mf-slate);
      font-size: var(--mf-text-s);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DemoAccounts {
  readonly isBusy = input(false);
  readonly chosen = output<DemoAccount>();

  protected readonly accounts = signal<readonly DemoAccount[]>([]);

  constructor() {
    inject(SessionApi)
      .demoAccounts()
      .pipe(takeUntilDestroyed(inject(DestroyRef)))
      // Without this list the form still signs people in, and its own message tells of a lost connection.
      .subscribe({ next: ({ accounts }) => this.accounts.set(accounts), error: () => this.accounts.set([]) });
  }
}
