import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Clock } from './clock';
import { GymZone } from './gym-zone';
import { fullTime, relativeWords } from './time-words';

/** How long ago (or ahead) an instant is, kept true as time passes; the full time is its tooltip. */
@Component({
  selector: 'mf-relative-time',
  template: `<time [attr.datetime]="at()" [title]="full()">{{ words() }}</time>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RelativeTime {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);

  /** The instant, ISO 8601. */
  readonly at = input.required<string>();

  protected readonly words = computed(() => relativeWords(Date.parse(this.at()), this.clock.nowMs()));
  protected readonly full = computed(() => fullTime(Date.parse(this.at()), this.gym.zone()));
}
