import type { Routes } from '@angular/router';

export const ROUTES_LIFTS: Routes = [
  {
    path: '',
    title: 'Lifts',
    loadComponent: () => import('./lifts-page').then((m) => m.LiftsPage),
  },
];
