import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  model,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Icon } from '../shared/icons/icon';
import {
  copied,
  DAY_NAMES,
  hoursWords,
  isClosed,
  MOST_SPANS,
  readClock,
  spanProblems,
  WEEKDAYS,
  weekLengthHours,
  withSpan,
  type DraftWeek,
  type Weekday,
} from './hours';

/** The coaching hours of a week, a row a day: up to four spans each, typed as times, copied from day to day. */
@Component({
  selector: 'mf-hours-editor',
  imports: [Icon, MatButton],
  templateUrl: './hours-editor.html',
  styleUrl: './hours-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HoursEditor {
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly week = model.required<DraftWeek>();
  /** Whether to say what is wrong with every span, also where nobody has been yet. */
  readonly showsAll = input(false);

  /** Spans that have been left, as `mon.0`; what is wrong is said from then on. */
  private readonly left = signal<ReadonlySet<string>>(new Set());
  protected readonly copying = signal<{ from: Weekday; to: readonly Weekday[] } | null>(null);
  protected readonly isClosed = computed(() => isClosed(this.week()));
  protected readonly sum = computed(() => hoursWords(weekLengthHours(this.week())));
  protected readonly days = computed(() =>
    WEEKDAYS.map((day) => {
      const problems = spanProblems(this.week()[day]);
      return {
        day,
        name: DAY_NAMES[day],
        mayAdd: this.week()[day].length < MOST_SPANS,
        spans: this.week()[day].map((span, i) => {
          const isSaid = this.showsAll() || this.left().has(`${day}.${i}`);
          return {
            ...span,
            id: `hours-${day}-${i}`,
            label: `${DAY_NAMES[day]}, span ${i + 1}`,
            problem: isSaid ? (problems[i] ?? {}) : {},
          };
        }),
      };
    }),
  );
  protected readonly targets = computed(() => {
    const copying = this.copying();
    if (!copying) return [];
    return WEEKDAYS.filter((day) => day !== copying.from).map((day) => ({
      day,
      name: DAY_NAMES[day],
      isChosen: copying.to.includes(day),
    }));
  });

  protected write(day: Weekday, i: number, end: 'from' | 'to', value: string): void {
    this.put(day, (spans) => spans.map((span, k) => (k === i ? { ...span, [end]: value } : span)));
  }

  /** Writes out a time that was typed short, and says what is wrong from now on. */
  protected leave(day: Weekday, i: number, end: 'from' | 'to', value: string): void {
    const clock = readClock(value);
    if (clock !== null && clock !== value) this.write(day, i, end, clock);
    if (end === 'to' || clock === null) this.left.update((left) => new Set([...left, `${day}.${i}`]));
  }

  protected add(day: Weekday): void {
    this.put(day, withSpan);
    const id = `hours-${day}-${this.week()[day].length - 1}-from`;
    setTimeout(() => this.element.querySelector<HTMLElement>(`#${id}`)?.focus());
  }

  protected remove(day: Weekday, i: number): void {
    this.put(day, (spans) => spans.filter((_span, k) => k !== i));
    this.element.querySelector<HTMLElement>(`#hours-${day}-add`)?.focus();
  }

  protected startCopy(from: Weekday): void {
    this.copying.set(this.copying()?.from === from ? null : { from, to: [] });
  }

  protected choose(day: Weekday, isChosen: boolean): void {
    this.copying.update(
      (copying) =>
        copying && {
          ...copying,
          to: isChosen ? [...copying.to, day] : copying.to.filter((one) => one !== day),
        },
    );
  }

  protected copy(): void {
    const copying = this.copying();
    if (!copying || copying.to.length === 0) return;
    this.week.set(copied(this.week(), copying.from, copying.to));
    this.endCopy(copying.from);
  }

  protected endCopy(from: Weekday): void {
    this.copying.set(null);
    this.element.querySelector<HTMLElement>(`#hours-${from}-copy`)?.focus();
  }

  private put(day: Weekday, change: (spans: DraftWeek[Weekday]) => DraftWeek[Weekday]): void {
    this.week.set({ ...this.week(), [day]: change(this.week()[day]) });
  }
}
