import { ChangeDetectionStrategy, Component, computed, input, model, signal } from '@angular/core';
import type { Person } from '@contract';
import { Icon } from '../shared/icons/icon';
import { findMembers } from './assignment-words';

/** Chooses some of the members: a search, a list to tick, and those chosen as chips that take themselves off. */
@Component({
  selector: 'mf-member-picker',
  imports: [Icon],
  template: `
    @if (chosen().length > 0) {
      <ul class="chosen" aria-label="Chosen">
        @for (member of chosen(); track member.id) {
          <li>
            <button type="button" [attr.aria-label]="'Take off ' + member.name" (click)="toggle(member.id)">
              {{ member.name }} <mf-icon name="close" [sizePx]="16" />
            </button>
          </li>
        }
      </ul>
    }
    <label>
      <span class="mf-visually-hidden">Search members</span>
      <input
        #field
        class="mf-input"
        type="search"
        placeholder="Search members"
        [attr.aria-invalid]="problem() ? true : null"
        [attr.aria-describedby]="problem() ? 'member-picker-problem' : null"
        (input)="search.set(field.value)"
        (keydown.enter)="$event.preventDefault()"
      />
    </label>
    @if (problem(); as problem) {
      <p class="error" id="member-picker-problem">{{ problem }}</p>
    }
    <ul class="list" aria-label="Members" tabindex="0">
      @for (member of found(); track member.id) {
        <li>
          <label class="mf-check">
            <input type="checkbox" [checked]="isChosen(member.id)" (change)="toggle(member.id)" />
            <span>{{ member.name }}</span>
          </label>
        </li>
      } @empty {
        <li class="mf-quiet none">No member of that name.</li>
      }
    </ul>
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--mf-space-2);
    }

    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }

    label {
      display: flex;
    }

    .chosen {
      display: flex;
      flex-wrap: wrap;
      gap: var(--mf-space-2);
    }

    button {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      min-height: var(--mf-target);
      padding: 0 12px 0 16px;
      color: var(--mat-sys-on-primary-container);
      background: var(--mf-spruce-wash);
      border: 0;
      border-radius: var(--mf-radius-pill);
      font-weight: 600;
    }

    .list {
      max-height: 240px;
      overflow-y: auto;
      border: var(--mf-hairline);
      border-radius: var(--mf-radius-m);
    }

    .list li {
      padding: 0 var(--mf-space-3);
    }

    .none {
      padding: var(--mf-space-3);
    }

    .error {
      color: var(--mat-sys-error);
      font-size: var(--mf-text-s);
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MemberPicker {
  readonly members = input.required<readonly Person[]>();
  /** What is wrong with the choice, or null. */
  readonly problem = input<string | null>(null);
  readonly memberIds = model.required<readonly string[]>();

  protected readonly search = signal('');
  protected readonly found = computed(() => findMembers(this.members(), this.search()));
  protected readonly chosen = computed(() =>
    this.members().filter(({ id }) => this.memberIds().includes(id)),
  );

  protected isChosen(id: string): boolean {
    return this.memberIds().includes(id);
  }

  protected toggle(id: string): void {
    this.memberIds.update((ids) => (ids.includes(id) ? ids.filter((one) => one !== id) : [...ids, id]));
  }
}
