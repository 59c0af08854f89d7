import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { EmptyState } from '../shared/empty-state/empty-state';
import { Icon } from '../shared/icons/icon';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { repsWords } from '../shared/take-words/brief-words';
import { countWords, liftsByPattern, viewsWords } from './lift-words';
import { LiftsStore } from './lifts-store';

/** The gym's library: its lifts by pattern. */
@Component({
  selector: 'mf-lifts-page',
  imports: [Chips, EmptyState, Icon, MatButton, PageHeading, ProblemBox, RouterLink, Skeleton],
  providers: [LiftsStore],
  templateUrl: './lifts-page.html',
  styleUrl: './lifts-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LiftsPage {
  private readonly router = inject(Router);

  protected readonly store = inject(LiftsStore);

  /** What is searched for, from the address. */
  readonly search = input<string>();
  /** `archived` for the lifts taken off the list, from the address. */
  readonly show = input<string>();

  protected readonly isArchived = computed(() => this.show() === 'archived');
  protected readonly options = computed<readonly ChipOption[]>(() => {
    const lifts = this.store.lifts() ?? [];
    const archived = lifts.filter((lift) => lift.archivedAt !== null).length;
    return [
      { value: 'used', label: 'In use', count: lifts.length - archived },
      { value: 'archived', label: 'Archived', count: archived },
    ];
  });
  protected readonly heading = computed(() => {
    const lifts = this.store.lifts();
    if (!lifts) return 'Lifts';
    const used = lifts.filter((lift) => lift.archivedAt === null).length;
    return used === 1 ? '1 lift in the library.' : `${used === 0 ? 'No' : used} lifts in the library.`;
  });
  protected readonly groups = computed(() =>
    liftsByPattern(this.store.lifts() ?? [], this.search() ?? '', this.isArchived()).map((group) => ({
      ...group,
      items: group.items.map((lift) => ({
        id: lift.id,
        name: lift.name,
        tempo: lift.tempo,
        brief: `${repsWords(lift.brief)}, ${viewsWords(lift.brief)}`,
        parts: `${countWords(lift.faults.length, 'fault')}, ${countWords(lift.scales.length, 'scale')}`,
      })),
    })),
  );

  protected choose(show: string): void {
    this.narrow({ show: show === 'archived' ? show : null });
  }

  protected find(search: string): void {
    this.narrow({ search: search === '' ? null : search });
  }

  private narrow(queryParams: { search?: string | null; show?: string | null }): void {
    void this.router.navigate(['/lifts'], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
