import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { BoardDto } from '@contract';
import { phoneWords, repsWords } from '../shared/take-words/brief-words';

/** What the member was asked to do and how to film it, folded away until wanted. */
@Component({
  selector: 'mf-asked-for',
  template: `
    <details>
      <summary>What was asked</summary>
      <p>{{ title() }}</p>
      @if (board().assignment.note; as note) {
        <p class="mf-quiet">{{ note }}</p>
      }
      <p class="mf-quiet">{{ brief() }}</p>
      @if (board().lift.brief.note; as note) {
        <p class="mf-quiet">{{ note }}</p>
      }
    </details>
  `,
  styles: `
    details {
      font-size: var(--mf-text-s);
    }

    summary {
      min-height: 28px;
      color: var(--mf-slate);
      font-weight: 600;
      cursor: pointer;
    }

    p {
      margin-top: var(--mf-space-1);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AskedFor {
  readonly board = input.required<BoardDto>();

  protected readonly title = computed(() => {
    const { title, load, reps, rounds } = this.board().assignment;
    const work = reps === null ? null : `${reps} reps${rounds === null ? '' : ` × ${rounds} rounds`}`;
    return [title, load, work].filter((part) => part).join(' · ');
  });
  protected readonly brief = computed(() => {
    const { brief } = this.board().lift;
    const inFrame = brief.inFrame === '' ? '' : `; in the picture: ${brief.inFrame}`;
    return `Filmed from ${this.board().take.views.join(' and ')}: ${repsWords(brief)}, ${phoneWords(brief)}${inFrame}.`;
  });
}
