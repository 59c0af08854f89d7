import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Icon } from '../icons/icon';

/** What a member who says that something hurts is told at once. The product never diagnoses. */
@Component({
  selector: 'mf-pain-caution',
  imports: [Icon],
  host: { role: 'alert' },
  template: `
    <mf-icon name="healing" [sizePx]="26" />
    <div>
      <strong>Stop this lift. Do not train through pain.</strong>
      <p>See a doctor or a physiotherapist.</p>
      <p>
        <strong>For chest pain, fainting, numbness or weakness call the emergency number now.</strong> Do not
        wait for an answer here.
      </p>
    </div>
  `,
  styles: `
    :host {
      display: flex;
      gap: var(--mf-space-3);
      padding: var(--mf-space-4);
      color: var(--mat-sys-on-tertiary-container);
      background: var(--mf-tape-wash);
      border-radius: var(--mf-radius-l);
    }

    p {
      margin-top: var(--mf-space-1);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PainCaution {}
