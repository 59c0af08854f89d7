import type { Routes } from '@angular/router';

export const ROUTES_PROGRESS: Routes = [
  {
    path: '',
    title: 'Progress',
    loadComponent: () => import('./progress-page').then((m) => m.ProgressPage),
  },
];
