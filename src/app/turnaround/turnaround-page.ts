import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { Chips, type ChipOption } from '../shared/chips/chips';
import { Download } from '../shared/download/download';
import { EmptyState } from '../shared/empty-state/empty-state';
import { PageHeading } from '../shared/page-heading/page-heading';
import { ProblemBox } from '../shared/problems/problem-box';
import { Skeleton } from '../shared/skeleton/skeleton';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { CSV_URL, queryOf } from './turnaround-api';
import { addressOf, dayIn, filterOf, PERIODS, periodOf, type Period } from './turnaround-filter';
import { TurnaroundStore } from './turnaround-store';
import {
  cautions,
  dayWords,
  keptCell,
  keptRange,
  lengthCell,
  lengthWords,
  medianRange,
  percentWords,
  standWords,
  weekBlocks,
  weekWords,
} from './turnaround-words';
import { WaitingCurve } from './waiting-curve';

const PERIOD_LABELS: Record<Period, string> = {
  '7': '7 days',
  '30': '30 days',
  '90': '90 days',
  '365': 'A year',
  days: 'Days chosen',
};
const DAYS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;
const BLOCKS = ['0–4', '4–8', '8–12', '12–16', '16–20', '20–24'] as const;

/** How long members wait, and whether the promise was kept: a sentence, then the numbers, then where they come from. */
@Component({
  selector: 'mf-turnaround-page',
  imports: [AbsoluteTime, Chips, EmptyState, PageHeading, ProblemBox, RouterLink, Skeleton, WaitingCurve],
  providers: [TurnaroundStore],
  templateUrl: './turnaround-page.html',
  styleUrl: './turnaround-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TurnaroundPage {
  private readonly clockNow = inject(Clock);
  private readonly download = inject(Download);
  private readonly gym = inject(GymZone);
  private readonly router = inject(Router);

  protected readonly store = inject(TurnaroundStore);

  // The filter, from the address.
  readonly period = input<string>();
  readonly from = input<string>();
  readonly to = input<string>();
  readonly coach = input<string>();
  readonly lift = input<string>();
  readonly clock = input<string>();

  protected readonly words = { dayWords, keptCell, lengthCell, lengthWords, percentWords, weekWords };
  protected readonly blocks = BLOCKS;
  protected readonly isSaving = signal(false);
  private readonly address = computed(() => ({
    period: this.period(),
    from: this.from(),
    to: this.to(),
    coach: this.coach(),
    lift: this.lift(),
    clock: this.clock(),
  }));
  private readonly today = computed(() => dayIn(this.clockNow.nowMs(), this.gym.zone()));
  protected readonly filter = computed(() => filterOf(this.address(), this.today()), {
    equal: (a, b) => JSON.stringify(a) === JSON.stringify(b),
  });
  protected readonly shownPeriod = computed(() => periodOf(this.address()));
  protected readonly periods: readonly ChipOption[] = [...PERIODS, 'days' as const].map((value) => ({
    value,
    label: PERIOD_LABELS[value],
  }));
  protected readonly clocks: readonly ChipOption[] = [
    { value: 'wall', label: 'All hours' },
    { value: 'coaching', label: 'Coaching hours' },
  ];
  protected readonly heading = computed(() => {
    const figures = this.store.figures();
    if (!figures) return 'Turnaround';
    return figures.answered + figures.waiting === 0 ? 'No takes in this time.' : standWords(figures);
  });
  protected readonly sub = computed(() => {
    const figures = this.store.figures();
    if (!figures) return undefined;
    const clock = figures.clock === 'coaching' ? 'coaching hours only' : 'nights and weekends included';
    return `Takes sent from ${dayWords(figures.from)} to ${dayWords(figures.to)}; ${clock}.`;
  });
  protected readonly isFiltered = computed(() => {
    const { coachId, liftId } = this.filter();
    return coachId !== null || liftId !== null || this.shownPeriod() !== '90';
  });
  protected readonly notes = computed(() => {
    const figures = this.store.figures();
    return figures ? cautions(figures, this.filter().coachId !== null) : [];
  });
  protected readonly range = computed(() => {
    const figures = this.store.figures();
    return figures ? { median: medianRange(figures), kept: keptRange(figures.kept) } : null;
  });
  /** The three tables of groups, told the same way. */
  protected readonly groups = computed(() => {
    const figures = this.store.figures();
    if (!figures) return [];
    return [
      {
        id: 'coach',
        heading: 'By coach',
        column: 'Coach',
        note: 'Takes are counted for the coach who answered; those that wait are nobody’s yet.',
        hasWaiting: false,
        rows: figures.byCoach
          .map((group) => ({ ...group, name: group.coach.name, key: group.coach.id }))
          .sort((a, b) => a.name.localeCompare(b.name, 'en')),
      },
      {
        id: 'lift',
        heading: 'By lift',
        column: 'Lift',
        note: null,
        hasWaiting: true,
        rows: figures.byLift
          .map((group) => ({ ...group, name: group.lift.name, key: group.lift.id }))
          .sort((a, b) => a.name.localeCompare(b.name, 'en')),
      },
      {
        id: 'week',
        heading: 'By week',
        column: 'Week',
        note: 'The week in which the take was sent.',
        hasWaiting: true,
        rows: figures.byWeek.map((group) => ({
          ...group,
          name: weekWords(group.weekStart),
          key: group.weekStart,
        })),
      },
    ];
  });
  protected readonly hoursOfWeek = computed(() =>
    weekBlocks(this.store.figures()?.week ?? []).map((cells, i) => ({ day: DAYS[i] ?? '', cells })),
  );

  constructor() {
    effect(() => {
      const filter = this.filter();
      untracked(() => void this.store.show(filter));
    });
  }

  protected choosePeriod(value: string): void {
    const period = this.periods.find((one) => one.value === value)?.value as Period | undefined;
    if (period) this.keep(addressOf(period, this.filter()));
  }

  protected keep(queryParams: Record<string, string | null>): void {
    void this.router.navigate(['/turnaround'], {
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected async saveCsv(): Promise<void> {
    this.isSaving.set(true);
    await this.download.save(`${CSV_URL}?${queryOf(this.filter()).toString()}`);
    this.isSaving.set(false);
  }
}
