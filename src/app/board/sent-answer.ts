import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import type { AnswerDto } from '@contract';
import { CALL_LABELS } from './board-words';

/** The answer that was sent, what was said after it, and a line to write back. */
@Component({
  selector: 'mf-sent-answer',
  template: `
    <h2>Answered by {{ answer().author.name }}</h2>
    <p class="cue">{{ answer().topCue }}</p>
    <p class="mf-small mf-quiet">
      {{ callLabels[answer().call] }}{{ answer().scale ? ': ' + answer().scale?.name : '' }}
    </p>
    @for (reply of answer().replies; track reply.id) {
      <p class="mf-small">{{ reply.author.name }}: {{ reply.body }}</p>
    }
    <form (submit)="$event.preventDefault(); send(field)">
      <label for="reply" class="mf-visually-hidden">Write back</label>
      <input #field id="reply" class="mf-input" maxlength="500" placeholder="Write back" autocomplete="off" />
      <button type="submit" class="mf-link-button">Send</button>
    </form>
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
      font-size: var(--mf-text-l);
      font-weight: 600;
    }

    form {
      display: flex;
      gap: var(--mf-space-2);
    }

    input {
      flex: 1;
      min-width: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SentAnswer {
  readonly answer = input.required<AnswerDto>();
  readonly replied = output<{ body: string; done: () => void }>();

  protected readonly callLabels = CALL_LABELS;

  /** The words stay in the field until they are sent. */
  protected send(field: HTMLInputElement): void {
    const body = field.value.trim();
    if (body === '') return;
    this.replied.emit({
      body,
      done: () => {
        field.value = '';
      },
    });
  }
}
