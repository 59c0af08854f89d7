import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Clock } from '../times/clock';
import { GymZone } from '../times/gym-zone';
import { dayAndTime, dayWords, durationShort, durationWords, fullTime } from '../times/time-words';

/** Under this the number and the line turn to tape: the coach's next hour. */
const RUNNING_OUT_MS = 60 * 60_000;

/** The time left until an answer is due: a number and a line that shrinks. For a later day the number is the time of day. */
@Component({
  selector: 'mf-time-left',
  host: { '[class.running-out]': 'isRunningOut()', '[title]': 'full()' },
  template: `
    <time class="mf-figures number" [class.day]="isLaterDay()" [attr.datetime]="answerBy()">
      <span aria-hidden="true">{{ number() }}</span>
      <span class="mf-visually-hidden">{{ spoken() }}</span>
    </time>
    <span class="track" aria-hidden="true"><span class="line" [style.width.%]="share() * 100"></span></span>
  `,
  styles: `
    :host {
      display: block;
      min-width: 88px;
    }

    .number {
      display: block;
      font-size: var(--mf-text-xl);
      font-weight: 700;
      line-height: 1.2;
      white-space: nowrap;
    }

    .number.day {
      font-size: var(--mf-text-l);
      font-weight: 600;
    }

    .track {
      display: block;
      height: 3px;
      margin-top: var(--mf-space-1);
      background: var(--mf-mist);
    }

    .line {
      display: block;
      height: 100%;
      background: var(--mat-sys-primary);
    }

    :host(.running-out) {
      .number {
        color: var(--mf-tape);
      }

      .line {
        background: var(--mf-tape-mark);
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TimeLeft {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);

  /** The moment by which the answer is due, ISO 8601. */
  readonly answerBy = input.required<string>();
  /** The moment from which the line began to shrink, ISO 8601; without it the line stands for twelve hours. */
  readonly since = input<string | null>(null);

  private readonly dueMs = computed(() => Date.parse(this.answerBy()));
  private readonly leftMs = computed(() => this.dueMs() - this.clock.nowMs());

  protected readonly isRunningOut = computed(() => this.leftMs() < RUNNING_OUT_MS);
  protected readonly isLaterDay = computed(
    () => this.leftMs() > 0 && dayWords(this.dueMs(), this.clock.nowMs(), this.gym.zone()) !== 'today',
  );
  protected readonly number = computed(() => {
    if (this.leftMs() <= 0) return `${durationShort(-this.leftMs())} late`;
    if (this.isLaterDay()) return dayAndTime(this.dueMs(), this.clock.nowMs(), this.gym.zone());
    return durationShort(this.leftMs());
  });
  protected readonly spoken = computed(() => {
    if (this.leftMs() <= 0) return `late by ${durationWords(-this.leftMs())}`;
    return `answer in ${durationWords(this.leftMs())}`;
  });
  protected readonly share = computed(() => {
    const since = this.since();
    const wholeMs = since ? this.dueMs() - Date.parse(since) : 12 * 3_600_000;
    return wholeMs <= 0 ? 0 : Math.min(1, Math.max(0, this.leftMs() / wholeMs));
  });
  protected readonly full = computed(() => `answer by ${fullTime(this.dueMs(), this.gym.zone())}`);
}
