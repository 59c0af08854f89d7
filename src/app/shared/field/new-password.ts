import type { AbstractControl, ValidationErrors } from '@angular/forms';

/** NIST SP 800-63B-4 §3.1.1.2: at least 15 characters where the password is the only factor. */
export const PASSWORD_MIN_LENGTH = 15;

/** What to say beside a new password. */
export const NEW_PASSWORD_HINT = 'At least 15 characters. A few words in a row are fine.';

/** Refuses a new password under 15 characters, counted as code points (one emoji is one character). */
export function longEnoughPassword(control: AbstractControl<string>): ValidationErrors | null {
  const missing = PASSWORD_MIN_LENGTH - [...control.value].length;
  if (control.value === '' || missing <= 0) return null;
  return { short: `${missing} more ${missing === 1 ? 'character' : 'characters'}, please.` };
}
