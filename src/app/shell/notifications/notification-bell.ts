import { ChangeDetectionStrategy, Component, ElementRef, inject, viewChild } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { NotificationDto } from '@contract';
import { Icon } from '../../shared/icons/icon';
import { ProblemBox } from '../../shared/problems/problem-box';
import { RelativeTime } from '../../shared/times/relative-time';
import { NotificationsStore } from './notifications-store';

/** The bell with its count, and the notices under it. */
@Component({
  selector: 'mf-notification-bell',
  imports: [Icon, ProblemBox, RelativeTime, RouterLink],
  templateUrl: './notification-bell.html',
  styleUrl: './notification-bell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotificationBell {
  protected readonly store = inject(NotificationsStore);
  private readonly panel = viewChild.required<ElementRef<HTMLElement>>('panel');

  protected open(notice: NotificationDto): void {
    this.panel().nativeElement.hidePopover();
    void this.store.markRead(notice);
  }
}
