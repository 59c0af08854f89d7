import { ChangeDetectionStrategy, Component, computed, DOCUMENT, inject } from '@angular/core';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { FirstUse, FirstUseScreen } from '../session/first-use';
import { SessionStore } from '../session/session-store';
import { Icon } from '../shared/icons/icon';
import { Logo } from '../shared/plumb/logo';
import { AccountMenu } from './account-menu';
import { navigationFor } from './navigation';
import { NotificationBell } from './notifications/notification-bell';
import { NotificationsStore } from './notifications/notifications-store';

/** The frame of every room but the board: header, navigation by role, and the page. */
@Component({
  selector: 'mf-shell',
  imports: [
    AccountMenu,
    FirstUseScreen,
    Icon,
    Logo,
    NotificationBell,
    RouterLink,
    RouterLinkActive,
    RouterOutlet,
  ],
  providers: [NotificationsStore],
  host: { '[class.for-member]': "store.role() === 'member'" },
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  private readonly document = inject(DOCUMENT);

  protected readonly store = inject(SessionStore);
  protected readonly firstUse = inject(FirstUse);
  protected readonly rooms = computed(() => navigationFor(this.store.role()));

  /** The `base` element would turn a plain `#main` link into another page, so the link is followed here. */
  protected skipToMain(event: Event): void {
    event.preventDefault();
    this.document.getElementById('main')?.focus();
  }

  /** The cautions were read to their end; the page after them begins at its top. */
  protected goOn(): void {
    this.firstUse.markRead();
    this.document.defaultView?.scrollTo(0, 0);
    this.document.getElementById('main')?.focus({ preventScroll: true });
  }

  protected closeMenu(): void {
    this.document.getElementById('mf-rooms')?.hidePopover();
  }
}
