import type { Routes } from '@angular/router';
import { unsavedChangesGuard } from '../shared/side-sheet/unsaved-changes';

export const ROUTES_GYM: Routes = [
  {
    path: '',
    title: 'Gym',
    canDeactivate: [unsavedChangesGuard],
    loadComponent: () => import('./gym-page').then((m) => m.GymPage),
  },
];
