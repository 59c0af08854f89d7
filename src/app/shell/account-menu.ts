import { ChangeDetectionStrategy, Component, ElementRef, inject, signal, viewChild } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { SessionApi } from '../session/session-api';
import { SessionStore } from '../session/session-store';
import { Avatar } from '../shared/avatar/avatar';
import { Preferences, type ThemeChoice } from '../shared/preferences/preferences';
import { problemOf } from '../shared/problems/problem';
import { Snackbar } from '../shared/snackbar/snackbar';

/** Who is signed in, the choices that belong to this browser, and the way out. */
@Component({
  selector: 'mf-account-menu',
  imports: [Avatar, RouterLink],
  templateUrl: './account-menu.html',
  styleUrl: './account-menu.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountMenu {
  private readonly api = inject(SessionApi);
  private readonly router = inject(Router);
  private readonly snackbar = inject(Snackbar);
  private readonly panel = viewChild.required<ElementRef<HTMLElement>>('panel');

  protected readonly store = inject(SessionStore);
  protected readonly preferences = inject(Preferences);
  protected readonly isLeaving = signal(false);
  protected readonly themes: readonly { value: ThemeChoice; label: string }[] = [
    { value: 'system', label: 'As the system' },
    { value: 'light', label: 'Light' },
    { value: 'dark', label: 'Dark' },
  ];

  protected close(): void {
    this.panel().nativeElement.hidePopover();
  }

  protected async signOut(): Promise<void> {
    this.isLeaving.set(true);
    try {
      await firstValueFrom(this.api.signOut());
      this.store.end();
      await this.router.navigateByUrl('/sign-in');
    } catch (error) {
      this.snackbar.say(`You are still signed in. ${problemOf(error).detail}`);
    } finally {
      this.isLeaving.set(false);
    }
  }
}
