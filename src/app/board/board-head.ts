import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { BoardDto } from '@contract';
import { KeyCap } from '../shared/key-cap/key-cap';
import { Logo } from '../shared/plumb/logo';
import { TimeLeft } from '../shared/time-left/time-left';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { dayAndTime } from '../shared/times/time-words';

/** Who, which lift, what is at stake and until when; what hurts stands first. */
@Component({
  selector: 'mf-board-head',
  host: { role: 'banner' },
  imports: [KeyCap, Logo, RouterLink, TimeLeft],
  template: `
    <a class="home" routerLink="/queue" aria-label="Back to the queue"><mf-logo /></a>
    <div class="who">
      <h1 tabindex="-1">
        {{ board().lift.name }} <span>take {{ board().take.number }}</span>
      </h1>
      <p>{{ about() }}</p>
    </div>
    @if (isOpen() && board().take.answerBy; as answerBy) {
      <mf-time-left [answerBy]="answerBy" [since]="board().take.submittedAt" />
    }
    <div class="when">
      @if (trains(); as words) {
        <span>{{ words }}</span>
      }
      @if (board().take.atStake; as reps) {
        <span
          ><strong class="mf-figures">{{ reps }} reps</strong> at stake</span
        >
      }
    </div>
    <button type="button" class="help" aria-label="Keys of the board" (click)="asked.emit()">
      <kbd mf-key-cap>?</kbd>
    </button>
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: var(--mf-space-2) var(--mf-space-4);
      padding: var(--mf-space-2) var(--mf-space-4);
      border-bottom: 1px solid var(--mf-mist);
    }

    .home {
      display: grid;
      place-items: center;
      min-width: var(--mf-target);
      min-height: var(--mf-target);
    }

    .who {
      flex: 1;
      min-width: 220px;
    }

    h1 {
      font-size: var(--mf-text-l);
      line-height: 1.2;
    }

    h1 span,
    p,
    .when {
      color: var(--mf-slate);
    }

    p,
    .when {
      font-size: var(--mf-text-s);
    }

    .when {
      display: grid;
      justify-items: end;
    }

    .help {
      min-width: 44px;
      min-height: 44px;
      background: none;
      border: 0;
      cursor: pointer;
    }

    @media (width < 900px) {
      .when {
        justify-items: start;
      }

      .help {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoardHead {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);

  readonly board = input.required<BoardDto>();
  readonly isOpen = input(true);
  readonly asked = output();

  protected readonly about = computed(() => {
    const { member, take, assignment } = this.board();
    const isOther = take.load !== null && assignment.load !== null && take.load !== assignment.load;
    const load = isOther ? `${take.load}, asked ${assignment.load}` : (take.load ?? assignment.load);
    return [member.name, load, take.implement, member.kit].filter((part) => part).join(' · ');
  });
  protected readonly trains = computed(() => {
    const at = this.board().take.neededBy ?? this.board().assignment.trainAt;
    return at ? `trains it ${dayAndTime(Date.parse(at), this.clock.nowMs(), this.gym.zone())}` : null;
  });
}
