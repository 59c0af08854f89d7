import type { Routes } from '@angular/router';
import { unsavedChangesGuard } from '../shared/side-sheet/unsaved-changes';

const form = () => import('./lift-form-page').then((m) => m.LiftFormPage);

export const ROUTES_LIFTS: Routes = [
  {
    path: '',
    title: 'Lifts',
    loadComponent: () => import('./lifts-page').then((m) => m.LiftsPage),
  },
  { path: 'new', title: 'A new lift', canDeactivate: [unsavedChangesGuard], loadComponent: form },
  {
    path: ':liftId',
    title: 'Lift',
    loadComponent: () => import('./lift-page').then((m) => m.LiftPage),
  },
  { path: ':liftId/edit', title: 'Change a lift', canDeactivate: [unsavedChangesGuard], loadComponent: form },
];
