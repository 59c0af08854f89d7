import type { AbstractControl, FormGroup } from '@angular/forms';
import type { Problem } from './problem';

/** The key under which a form control carries what the server said about it. */
export const SERVER_ERROR = 'server';

/** Finds a control by the API's path, written `scales.0.name`, `scales[0].name` or `/scales/0/name`. */
function controlAt(form: FormGroup, path: string): AbstractControl | null {
  const names = path.split(/[.[\]/]+/).filter((part) => part !== '' && part !== 'body');
  return names.length === 0 ? null : form.get(names);
}

/**
 * Puts each of the server's messages beside its field: the control gets the error `server`, which goes away with the
 * next keystroke because the control is then validated anew.
 * @returns the problem with only those messages that no field of the form could take; show it in `mf-problem-box`.
 */
export function applyProblem(form: FormGroup, problem: Problem): Problem {
  const left = (problem.errors ?? []).filter(({ path, message }) => {
    const control = controlAt(form, path);
    if (!control) return true;
    control.setErrors({ ...control.errors, [SERVER_ERROR]: message });
    control.markAsTouched();
    return false;
  });
  return { ...problem, errors: left };
}
