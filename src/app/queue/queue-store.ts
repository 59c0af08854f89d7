import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge } from 'rxjs';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { QueueApi, type QueueFilter, type QueuePageDto } from './queue-api';
import { freshRows, holdRows, type HeldRows } from './queue-rows';

const PAGE_SIZE = 50;
/** Events come in bunches; one fetch answers them all. */
const GATHER_MS = 250;

/** The queue as it is shown, kept true by events. Provided by the page. */
@Injectable()
export class QueueStore {
  private readonly api = inject(QueueApi);
  private filter: QueueFilter = { only: null, liftId: null };
  private latest: QueuePageDto | null = null;
  private isHeld = false;
  private fetches = 0;

  readonly held = signal<HeldRows>({ rows: [], newCount: 0, isMoved: false });
  readonly counts = signal<{ waiting: number; hurting: number; unplayable: number } | null>(null);
  readonly hasMore = signal(false);
  readonly isLoading = signal(true);
  readonly problem = signal<Problem | null>(null);
  /** When each take was picked up, ms, as far as it was seen to happen. */
  readonly pickedUpAt = signal<ReadonlyMap<string, number>>(new Map());

  constructor() {
    const live = inject(LiveEvents);
    const destroyRef = inject(DestroyRef);
    const changes = live.of(
      'take.waiting',
      'take.picked-up',
      'take.put-back',
      'take.lapsed',
      'take.answered',
      'take.unplayable',
      'take.withdrawn',
      'take.submitted',
      'take.retried',
    );
    live
      .of('take.picked-up')
      .pipe(takeUntilDestroyed(destroyRef))
      .subscribe(({ takeId, at }) => {
        if (takeId) this.pickedUpAt.update((known) => new Map(known).set(takeId, Date.parse(at)));
      });
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(destroyRef))
      .subscribe(() => void this.refresh());
  }

  /** Shows another part of the queue. */
  async narrow(filter: QueueFilter): Promise<void> {
    this.filter = filter;
    this.isLoading.set(true);
    await this.refresh(true);
  }

  /** Fetches as many rows as are shown, at least a page. */
  async refresh(isNewList = false): Promise<void> {
    const fetch = ++this.fetches;
    try {
      const limit = Math.min(100, Math.max(PAGE_SIZE, isNewList ? 0 : this.held().rows.length));
      const page = await firstValueFrom(this.api.queue(this.filter, limit));
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.take(page, isNewList);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    } finally {
      if (fetch === this.fetches) this.isLoading.set(false);
    }
  }

  /** Adds the next page to the end. */
  async more(): Promise<void> {
    const { latest } = this;
    if (!latest?.next) return;
    try {
      const page = await firstValueFrom(this.api.queue(this.filter, PAGE_SIZE, latest.next));
      const merged = { ...page, items: [...latest.items, ...page.items] };
      this.take(merged, true);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** While held (pointer over the list, focus inside) no row moves. */
  hold(isHeld: boolean): void {
    this.isHeld = isHeld;
    const { newCount, isMoved, rows } = this.held();
    if (!isHeld && (newCount > 0 || isMoved || rows.some((row) => row.isGone))) this.apply();
  }

  /** Shows the queue as it is now. */
  apply(): void {
    if (this.latest) this.held.set(freshRows(this.latest.items));
  }

  private take(page: QueuePageDto, isNewList: boolean): void {
    this.latest = page;
    this.problem.set(null);
    this.counts.set({ waiting: page.waiting, hurting: page.hurting, unplayable: page.unplayable });
    this.hasMore.set(page.next !== null);
    const mustHold = this.isHeld && !isNewList && this.held().rows.length > 0;
    this.held.set(mustHold ? holdRows(this.held().rows, page.items) : freshRows(page.items));
  }
}
