import { ChangeDetectionStrategy, Component, contentChild, effect, input } from '@angular/core';
import { FieldInput } from './field-input';

/**
 * A field of a form: label above, the native control, a hint and the error below.
 * Use as `<mf-field label="Name"><input mfInput formControlName="name" /></mf-field>`; anything else put inside
 * (a button, a unit) stands at the end of the control's line.
 */
@Component({
  selector: 'mf-field',
  template: `
    <label [attr.for]="control().id">
      {{ label() }}
      @if (optional()) {
        <span class="optional">optional</span>
      }
    </label>
    <div class="line"><ng-content /></div>
    @if (hint(); as hint) {
      <p class="hint" [id]="control().id + '-hint'">{{ hint }}</p>
    }
    @if (control().message(); as message) {
      <p class="error" [id]="control().id + '-error'">{{ message }}</p>
    }
  `,
  styleUrl: './field.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Field {
  /** The name of the field, shown above it. */
  readonly label = input.required<string>();
  /** A sentence of help under the control. */
  readonly hint = input<string>();
  /** Whether to say that the field may stay empty. */
  readonly optional = input(false);

  protected readonly control = contentChild.required(FieldInput);

  constructor() {
    effect(() => this.control().hasHint.set(this.hint() !== undefined));
  }
}
