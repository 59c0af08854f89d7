import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Clock } from './clock';
import { GymZone } from './gym-zone';
import { dayAndTime, fullTime } from './time-words';

/** An instant by day and clock in the gym's time zone: "today 18:00"; the full time is its tooltip. */
@Component({
  selector: 'mf-absolute-time',
  template: `<time [attr.datetime]="at()" [title]="full()">{{ words() }}</time>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AbsoluteTime {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);

  /** The instant, ISO 8601. */
  readonly at = input.required<string>();

  protected readonly words = computed(() =>
    dayAndTime(Date.parse(this.at()), this.clock.nowMs(), this.gym.zone()),
  );
  protected readonly full = computed(() => fullTime(Date.parse(this.at()), this.gym.zone()));
}
