import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { SessionStore } from '../session/session-store';
import { Poster } from '../shared/poster/poster';
import { TimeLeft } from '../shared/time-left/time-left';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import type { QueueRow } from './queue-rows';
import { holderWords, trainingWords } from './queue-words';

/** One take of the queue: how long is left, who, what, what they said, and the way to the board. */
@Component({
  selector: 'mf-queue-row',
  imports: [MatButton, Poster, RouterLink, TimeLeft],
  host: { '[class.gone]': 'row().isGone' },
  templateUrl: './queue-row.html',
  styleUrl: './queue-row.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QueueRowPart {
  private readonly clock = inject(Clock);
  private readonly zone = inject(GymZone).zone;
  private readonly session = inject(SessionStore);

  readonly row = input.required<QueueRow>();
  /** The first row's button is the filled one: it is what comes next. */
  readonly isFirst = input(false);
  /** When it was picked up, ms, where that is known. */
  readonly pickedUpAtMs = input<number | null>(null);

  protected readonly item = computed(() => this.row().item);
  protected readonly training = computed(() => trainingWords(this.item(), this.clock.nowMs(), this.zone()));
  protected readonly isMine = computed(() => this.item().pickedUpBy?.id === this.session.user()?.id);
  protected readonly holder = computed(() => {
    const by = this.item().pickedUpBy;
    return by ? holderWords(by.name, this.isMine(), this.pickedUpAtMs(), this.clock.nowMs()) : null;
  });
  protected readonly posters = computed(() => {
    const { take, posters, member } = this.item();
    return take.views.map((view) => ({
      view,
      url: posters.find((poster) => poster.view === view)?.url ?? null,
      alt: `${member.name}, ${view}`,
    }));
  });
}
