import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  ElementRef,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { EmptyState } from '../shared/empty-state/empty-state';
import { KeyCap } from '../shared/key-cap/key-cap';
import { Keys } from '../shared/keys/keys';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { Snackbar } from '../shared/snackbar/snackbar';
import { QueueApi, type QueueOnly } from './queue-api';
import { QueueListHold } from './queue-list-hold';
import { QueueRowPart } from './queue-row';
import { QueueStore } from './queue-store';
import { queueSentence } from './queue-words';

const ONLY: readonly QueueOnly[] = ['needed-today', 'second-takes', 'nobody-has-it'];
const ALL = 'all';

/** The takes that wait, in the order in which they are needed. */
@Component({
  selector: 'mf-queue-page',
  imports: [
    Chips,
    EmptyState,
    KeyCap,
    MatButton,
    PageHeading,
    ProblemBox,
    QueueListHold,
    QueueRowPart,
    RouterLink,
    Skeleton,
  ],
  providers: [QueueStore],
  templateUrl: './queue-page.html',
  styleUrl: './queue-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QueuePage {
  private readonly api = inject(QueueApi);
  private readonly router = inject(Router);
  private readonly snackbar = inject(Snackbar);
  private readonly list = viewChild<ElementRef<HTMLElement>>('list');

  protected readonly store = inject(QueueStore);

  /** Which part to show, from the address. */
  readonly only = input<string>();
  /** The lift to show, from the address. */
  readonly lift = input<string>();

  protected readonly chosen = computed(() => ONLY.find((only) => only === this.only()) ?? ALL);
  protected readonly options: readonly ChipOption[] = [
    { value: ALL, label: 'All' },
    { value: 'needed-today', label: 'Needed today' },
    { value: 'second-takes', label: 'Second takes' },
    { value: 'nobody-has-it', label: 'Nobody has it' },
  ];
  protected readonly lifts = signal<readonly { id: string; name: string }[]>([]);
  protected readonly heading = computed(() => {
    const counts = this.store.counts();
    return counts ? queueSentence(counts.waiting, counts.hurting) : 'Queue';
  });
  protected readonly isNarrowed = computed(() => this.chosen() !== ALL || (this.lift() ?? '') !== '');

  constructor() {
    effect(() => {
      const only = this.chosen();
      const filter = { only: only === ALL ? null : only, liftId: this.lift() ?? null };
      untracked(() => void this.store.narrow(filter));
    });
    void this.loadLifts();
    const remove = inject(Keys).register([
      { key: 'Enter', label: 'open the first', group: 'Queue', run: () => this.openFirst() },
      { key: 'ArrowDown', label: 'next row', group: 'Queue', run: () => this.move(1), repeats: true },
      { key: 'ArrowUp', label: 'row before', group: 'Queue', run: () => this.move(-1), repeats: true },
      { key: 'n', label: 'show what is new', group: 'Queue', run: () => this.store.apply() },
    ]);
    inject(DestroyRef).onDestroy(remove);
  }

  protected choose(only: string): void {
    this.narrow({ only: only === ALL ? null : only });
  }

  protected chooseLift(liftId: string): void {
    this.narrow({ lift: liftId === '' ? null : liftId });
  }

  protected showAll(): void {
    this.narrow({ only: null, lift: null });
  }

  private narrow(queryParams: { only?: string | null; lift?: string | null }): void {
    void this.router.navigate(['/queue'], { queryParams, queryParamsHandling: 'merge' });
  }

  private async loadLifts(): Promise<void> {
    try {
      const { items } = await firstValueFrom(this.api.lifts());
      this.lifts.set(items.filter((lift) => lift.archivedAt === null));
    } catch {
      this.snackbar.offer(
        'The list of lifts could not be fetched.',
        'Try again',
        () => void this.loadLifts(),
      );
    }
  }

  private openFirst(): void {
    const first = this.store.held().rows.find((row) => !row.isGone && row.item.pickedUpBy === null);
    if (first) void this.router.navigate(['/board', first.item.take.id]);
  }

  /** Moves the focus between the rows' links; the list is then held, so that nothing moves under it. */
  private move(by: number): void {
    const links = [...(this.list()?.nativeElement.querySelectorAll<HTMLElement>('a.open') ?? [])];
    const active = links.findIndex((link) => link === link.ownerDocument.activeElement);
    const next = links[Math.min(links.length - 1, Math.max(0, active + by))];
    next?.focus();
  }
}
