import type { Routes } from '@angular/router';
import { unsavedChangesGuard } from '../shared/side-sheet/unsaved-changes';

export const ROUTES_ACCOUNT: Routes = [
  {
    path: '',
    title: 'Your account',
    canDeactivate: [unsavedChangesGuard],
    loadComponent: () => import('./account-page').then((m) => m.AccountPage),
  },
];
