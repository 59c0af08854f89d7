import type { ValidationErrors } from '@angular/forms';
import { SERVER_ERROR } from '../problems/apply-problem';

/**
 * The first error of a control in words for the person filling it in, or null when there is none.
 * A validator of our own gives its words as the error's value; the server's words come first.
 */
export function fieldMessage(errors: ValidationErrors | null): string | null {
  if (!errors) return null;
  const own = [errors[SERVER_ERROR], ...Object.values(errors)].find((value) => typeof value === 'string');
  if (typeof own === 'string') return own;
  if (errors['required']) return 'Please fill this in.';
  if (errors['email']) return 'Write an e-mail address, for instance you@gym.example.';
  if (errors['minlength']) return `Use at least ${String(errors['minlength'].requiredLength)} characters.`;
  if (errors['maxlength']) return `Use at most ${String(errors['maxlength'].requiredLength)} characters.`;
  if (errors['min']) return `At least ${String(errors['min'].min)}.`;
  if (errors['max']) return `At most ${String(errors['max'].max)}.`;
  return 'Please check this.';
}
