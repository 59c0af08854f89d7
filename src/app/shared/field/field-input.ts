import { computed, DestroyRef, Directive, ElementRef, inject, signal, type OnInit } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NgControl } from '@angular/forms';
import { fieldMessage } from './field-message';

let count = 0;

/**
 * Ties a native `input`, `select` or `textarea` to the `mf-field` around it: id, described-by, invalid, and the words
 * for its error. An error shows once the person has left the field, and at once when the server sent it.
 */
@Directive({
  selector: 'input[mfInput], select[mfInput], textarea[mfInput]',
  exportAs: 'mfInput',
  host: {
    class: 'mf-input',
    '[id]': 'id',
    '[attr.aria-invalid]': 'message() ? true : null',
    '[attr.aria-describedby]': 'describedBy()',
  },
})
export class FieldInput implements OnInit {
  readonly element: HTMLElement = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  readonly id = this.element.id || `mf-input-${++count}`;

  /** Whether the field around it has a hint to be read out. */
  readonly hasHint = signal(false);
  /** What is wrong with the value, or null. */
  readonly message = signal<string | null>(null);

  protected readonly describedBy = computed(() => {
    const ids = [this.hasHint() ? `${this.id}-hint` : '', this.message() ? `${this.id}-error` : ''].filter(
      Boolean,
    );
    return ids.length > 0 ? ids.join(' ') : null;
  });

  private readonly control = inject(NgControl, { self: true, optional: true });
  private readonly destroyRef = inject(DestroyRef);

  ngOnInit(): void {
    this.control?.control?.events
      .pipe(takeUntilDestroyed(this.destroyRef))
      .subscribe(() => this.message.set(this.readMessage()));
  }

  private readMessage(): string | null {
    const control = this.control?.control;
    return control?.touched && control.invalid ? fieldMessage(control.errors) : null;
  }
}
