import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { BoardDto } from '@contract';
import { AbsoluteTime } from '../shared/times/absolute-time';
import { CALL_LABELS } from './board-words';

/** What was answered to an earlier take: its one thing to change, its call, its comments. */
@Component({
  selector: 'mf-said-before',
  imports: [AbsoluteTime],
  template: `
    <h2>Take {{ earlier().take.number }}, <mf-absolute-time [at]="sentAt()" /></h2>
    @if (earlier().answer; as answer) {
      <p class="cue">{{ answer.topCue }}</p>
      <p class="mf-small mf-quiet">{{ words() }}</p>
      <ul class="mf-list">
        @for (comment of answer.comments; track comment.id) {
          <li class="mf-small">{{ comment.body }}</li>
        }
      </ul>
    } @else {
      <p class="mf-small mf-quiet">It has no answer.</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--mf-space-1);
    }

    h2 {
      color: var(--mf-slate);
      font-size: var(--mf-text-s);
    }

    .cue {
      font-weight: 600;
    }

    li {
      padding: 2px 0;
      color: var(--mf-slate);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SaidBefore {
  readonly earlier = input.required<BoardDto['earlierTakes'][number]>();

  protected readonly sentAt = computed(
    () => this.earlier().take.submittedAt ?? this.earlier().take.createdAt,
  );
  protected readonly words = computed(() => {
    const answer = this.earlier().answer;
    if (!answer) return '';
    const call =
      answer.scale && answer.call === 'scale' ? `use ${answer.scale.name}` : CALL_LABELS[answer.call];
    const asked = answer.refilm?.note;
    return `${answer.author.name}: ${call}.${asked ? ` Asked for: ${asked}` : ''}`;
  });
}
