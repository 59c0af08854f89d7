import { inject } from '@angular/core';
import type { CanDeactivateFn } from '@angular/router';
import { Confirm } from '../confirm/confirm';

/** A routed page that may hold changes nobody has saved. */
export interface HasUnsavedChanges {
  hasUnsavedChanges(): boolean;
}

/** Asks before a page with unsaved changes is left; put it on the page's route as `canDeactivate`. */
export const unsavedChangesGuard: CanDeactivateFn<HasUnsavedChanges> = (page) =>
  !page.hasUnsavedChanges() || inject(Confirm).discardChanges();
