import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  Injectable,
  output,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { PageHeading } from '../shared/page-heading/page-heading';
import { localChoice } from '../shared/preferences/local-choice';
import { Cautions } from './cautions';
import { SessionStore } from './session-store';

/** Knows whether the member signed in here has read the cautions in this browser. */
@Injectable({ providedIn: 'root' })
export class FirstUse {
  private readonly store = inject(SessionStore);
  private readonly readNow = signal<readonly string[]>([]);

  readonly isDue = computed(() => {
    const user = this.store.user();
    if (user?.role !== 'member' || this.readNow().includes(user.id)) return false;
    return localChoice.read(keyFor(user.id)) === null;
  });

  markRead(): void {
    const user = this.store.user();
    if (!user) return;
    localChoice.write(keyFor(user.id), 'read');
    this.readNow.update((ids) => [...ids, user.id]);
  }
}

function keyFor(userId: string): string {
  return `midfoot.cautions.${userId}`;
}

/** What a member reads once, before the first clip. */
@Component({
  selector: 'mf-first-use',
  imports: [Cautions, MatButton, PageHeading],
  template: `
    <div class="mf-page mf-page-narrow">
      <mf-page-heading
        heading="Before you film"
        sub="Read this once. It stays under “Cautions” in your account menu."
      />
      <mf-cautions />
      <button matButton="filled" type="button" (click)="understood.emit()">I have read this</button>
    </div>
  `,
  styles: `
    button {
      width: 100%;
      margin-top: var(--mf-space-4);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FirstUseScreen {
  readonly understood = output();
}
