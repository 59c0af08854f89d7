import { ChangeDetectionStrategy, Component, input, output, signal } from '@angular/core';
import type { CommentDto } from '@contract';
import { Icon } from '../shared/icons/icon';
import { clipTime } from '../shared/times/time-words';
import { MANY_COMMENTS } from './board-words';

/** What was said so far, in the order of the clip; one press goes to its instant. */
@Component({
  selector: 'mf-comment-list',
  imports: [Icon],
  template: `
    <h2>
      Said so far
      @if (comments().length > 0) {
        <span class="mf-figures">{{ comments().length }}</span>
      }
    </h2>
    <ol class="mf-list">
      @for (comment of comments(); track comment.id) {
        <li [class.here]="comment.id === openId()">
          @if (editing() === comment.id) {
            <form (submit)="$event.preventDefault(); keep(comment, field.value)">
              <input
                #field
                class="mf-input"
                [value]="comment.body"
                maxlength="500"
                [attr.aria-label]="'Comment at ' + clipTime(comment.atMs)"
                (keydown.escape)="editing.set(null)"
              />
              <button type="submit" class="mf-link-button">Keep</button>
            </form>
          } @else {
            <button type="button" class="words" (click)="opened.emit(comment)">
              <span class="at mf-figures">{{ clipTime(comment.atMs) }} {{ comment.view }}</span>
              {{ comment.body }}
            </button>
            @if (!isReadOnly() && comment.author.id === me()) {
              <button
                type="button"
                class="mf-icon-button"
                [attr.aria-label]="'Change the comment at ' + clipTime(comment.atMs)"
                (click)="editing.set(comment.id)"
              >
                <mf-icon name="edit" [sizePx]="18" />
              </button>
              <button
                type="button"
                class="mf-icon-button"
                [attr.aria-label]="'Delete the comment at ' + clipTime(comment.atMs)"
                (click)="deleted.emit(comment)"
              >
                <mf-icon name="delete" [sizePx]="18" />
              </button>
            }
          }
        </li>
      } @empty {
        <li class="mf-quiet">
          {{ isReadOnly() ? 'No comments.' : 'Nothing yet. Stop where you see it and type.' }}
        </li>
      }
    </ol>
    @if (comments().length > many) {
      <p class="mf-small mf-quiet">
        People change one thing at a time; {{ comments().length }} comments are a lot to take in.
      </p>
    }
  `,
  styles: `
    h2 {
      color: var(--mf-slate);
      font-size: var(--mf-text-s);
    }

    ol > li {
      display: flex;
      align-items: flex-start;
      gap: var(--mf-space-1);
      padding: var(--mf-space-1) 0;
      font-size: var(--mf-text-s);
    }

    .words {
      flex: 1;
      min-width: 0;
      min-height: 32px;
      padding: 4px 0;
      color: inherit;
      background: none;
      border: 0;
      text-align: left;
      overflow-wrap: anywhere;
      cursor: pointer;
    }

    .at {
      margin-right: var(--mf-space-1);
      color: var(--mf-tape);
      font-weight: 600;
    }

    .here {
      background: var(--mat-sys-surface-container-highest);
    }

    .mf-icon-button {
      width: 32px;
      min-width: 32px;
      height: 32px;
    }

    form {
      display: flex;
      flex: 1;
      gap: var(--mf-space-2);
    }

    form input {
      flex: 1;
      min-width: 0;
    }

    @media (width < 900px) {
      .mf-icon-button {
        width: var(--mf-target);
        height: var(--mf-target);
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CommentList {
  readonly comments = input.required<readonly CommentDto[]>();
  readonly openId = input<string | null>(null);
  /** The signed-in coach: one's own comments can be changed. */
  readonly me = input<string | null>(null);
  readonly isReadOnly = input(false);
  readonly opened = output<CommentDto>();
  readonly changed = output<{ comment: CommentDto; body: string }>();
  readonly deleted = output<CommentDto>();

  protected readonly editing = signal<string | null>(null);
  protected readonly clipTime = clipTime;
  protected readonly many = MANY_COMMENTS;

  protected keep(comment: CommentDto, body: string): void {
    this.editing.set(null);
    const words = body.trim();
    if (words !== '' && words !== comment.body) this.changed.emit({ comment, body: words });
  }
}
