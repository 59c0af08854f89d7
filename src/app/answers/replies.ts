import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import type { ReplyDto } from '@contract';
import { SessionStore } from '../session/session-store';
import { Avatar } from '../shared/avatar/avatar';
import { Field } from '../shared/field/field';
import { FieldInput } from '../shared/field/field-input';
import { ProblemBox } from '../shared/problems/problem-box';
import { requestKey } from '../shared/request-key/request-key';
import { RelativeTime } from '../shared/times/relative-time';
import { AnswerStore } from './answer-store';

/** What was asked back and said to it. One question at a time: the next after the coach has replied. */
@Component({
  selector: 'mf-replies',
  imports: [Avatar, Field, FieldInput, MatButton, ProblemBox, ReactiveFormsModule, RelativeTime],
  template: `
    @if (replies().length > 0) {
      <ul class="mf-list" aria-live="polite">
        @for (reply of replies(); track reply.id) {
          <li>
            <mf-avatar [name]="reply.author.name" [sizePx]="32" />
            <div>
              <p class="mf-small mf-quiet">
                {{ reply.author.name }}, <mf-relative-time [at]="reply.createdAt" />
              </p>
              <p class="body">{{ reply.body }}</p>
            </div>
          </li>
        }
      </ul>
    }
    @if (mayWrite()) {
      <form class="mf-stack" [formGroup]="form" (ngSubmit)="send()">
        <mf-field [label]="label()">
          <textarea mfInput formControlName="body" rows="2" maxlength="500"></textarea>
        </mf-field>
        @if (store.replyProblem(); as problem) {
          <mf-problem-box [problem]="problem" />
        }
        <button matButton="outlined" type="submit" [disabled]="store.isReplying()">
          {{ store.isReplying() ? 'Sending …' : 'Send' }}
        </button>
      </form>
    } @else {
      <p class="mf-small mf-quiet">You have asked. Your coach’s reply comes here.</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--mf-space-4);
    }

    li {
      display: flex;
      gap: var(--mf-space-3);
    }

    .body {
      overflow-wrap: anywhere;
      white-space: pre-line;
    }

    form {
      gap: var(--mf-space-3);
      align-items: stretch;
    }

    form button {
      align-self: flex-start;
      min-height: var(--mf-target);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Replies {
  private readonly session = inject(SessionStore);
  protected readonly store = inject(AnswerStore);
  private key = requestKey();

  readonly replies = input.required<readonly ReplyDto[]>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    body: ['', [Validators.required, Validators.maxLength(500)]],
  });
  protected readonly label = computed(() => (this.session.isStaff() ? 'Reply' : 'Ask one thing back'));
  protected readonly mayWrite = computed(
    () => this.session.isStaff() || this.replies().at(-1)?.author.id !== this.session.user()?.id,
  );

  protected async send(): Promise<void> {
    const body = this.form.controls.body.value.trim();
    if (body === '' || this.form.invalid) return this.form.markAllAsTouched();
    if (!(await this.store.reply(body, this.key))) return;
    this.key = requestKey();
    this.form.reset();
  }
}
