import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { DraftAnswer, LiftDto } from '@contract';
import { viewsPhrase } from '../shared/take-words/take-words';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import { dayAndTime } from '../shared/times/time-words';

/** What the member will read, as it stands now. */
@Component({
  selector: 'mf-answer-preview',
  template: `
    <p class="cue">{{ draft().topCue.trim() }}</p>
    @for (line of lines(); track $index) {
      <p>{{ line }}</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--mf-space-1);
      padding: var(--mf-space-3);
      background: var(--mat-sys-surface-container-highest);
      border-radius: var(--mf-radius-m);
      font-size: var(--mf-text-s);
      overflow-wrap: anywhere;
    }

    .cue {
      font-size: var(--mf-text-m);
      font-weight: 600;
    }

    .cue:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AnswerPreview {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);

  readonly draft = input.required<DraftAnswer>();
  readonly lift = input.required<LiftDto>();
  readonly commentCount = input(0);

  protected readonly lines = computed(() => {
    const { call, scaleId, tempo, refilm } = this.draft();
    const scale = this.lift().scales.find((one) => one.id === scaleId);
    const count = this.commentCount();
    const by = refilm?.by
      ? `, by ${dayAndTime(Date.parse(refilm.by), this.clock.nowMs(), this.gym.zone())}`
      : '';
    return [
      call === 'go' ? 'Go as planned.' : '',
      call === 'light' ? 'Keep it light.' : '',
      call === 'scale' && scale ? `Use: ${scale.name}.${scale.note ? ` ${scale.note}` : ''}` : '',
      tempo?.trim() ? `Tempo ${tempo.trim()}.` : '',
      refilm && refilm.views.length > 0 ? `Film it again: ${viewsPhrase(refilm.views)}${by}.` : '',
      refilm?.note?.trim() ?? '',
      count === 0
        ? 'No comments in the clips.'
        : `${count} ${count === 1 ? 'comment' : 'comments'} in the clips.`,
    ].filter((line) => line !== '');
  });
}
