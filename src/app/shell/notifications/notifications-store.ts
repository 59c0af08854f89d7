import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { firstValueFrom, merge } from 'rxjs';
import type { NotificationDto } from '@contract';
import { problemOf, type Problem } from '../../shared/problems/problem';
import { LiveEvents } from '../live-events';
import { NotificationsApi } from './notifications-api';

/** My notices, newest first, kept fresh by the live line. Provided by the shell, so it lives while one is signed in. */
@Injectable()
export class NotificationsStore {
  private readonly api = inject(NotificationsApi);

  readonly items = signal<readonly NotificationDto[]>([]);
  readonly unread = signal(0);
  readonly problem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    merge(live.of('notification.created'), live.resumed)
      .pipe(takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.load());
    void this.load();
  }

  async load(): Promise<void> {
    try {
      const { items, unread } = await firstValueFrom(this.api.list());
      this.items.set(items);
      this.unread.set(unread);
      this.problem.set(null);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** Marks every notice read: here at once, on the server behind it. */
  async markAllRead(): Promise<void> {
    if (this.unread() === 0) return;
    this.unread.set(0);
    try {
      await firstValueFrom(this.api.markRead());
    } finally {
      await this.load();
    }
  }

  async markRead(notice: NotificationDto): Promise<void> {
    if (notice.readAt !== null) return;
    this.unread.update((count) => Math.max(0, count - 1));
    try {
      await firstValueFrom(this.api.markRead([notice.id]));
    } finally {
      await this.load();
    }
  }
}
