import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { Icon } from '../icons/icon';
import { Field } from './field';
import { FieldInput } from './field-input';

/** A password with a button to show it. Pasting works, and nothing is asked of it but its length. */
@Component({
  selector: 'mf-password-field',
  imports: [Field, FieldInput, Icon, ReactiveFormsModule],
  template: `
    <mf-field [label]="label()" [hint]="hint()">
      <input
        mfInput
        [type]="isShown() ? 'text' : 'password'"
        [formControl]="control()"
        [attr.autocomplete]="purpose()"
        autocapitalize="none"
        spellcheck="false"
      />
      <button
        type="button"
        class="mf-icon-button"
        [attr.aria-pressed]="isShown()"
        [attr.aria-label]="'Show ' + label().toLowerCase()"
        (click)="isShown.set(!isShown())"
      >
        <mf-icon [name]="isShown() ? 'visibility-off' : 'visibility'" />
      </button>
    </mf-field>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PasswordField {
  readonly control = input.required<FormControl<string>>();
  readonly label = input('Password');
  readonly hint = input<string>();
  /** Tells password managers whether to fill in the present password or offer a new one. */
  readonly purpose = input<'current-password' | 'new-password'>('current-password');

  protected readonly isShown = signal(false);
}
