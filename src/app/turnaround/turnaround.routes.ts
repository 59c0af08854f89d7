import type { Routes } from '@angular/router';

export const ROUTES_TURNAROUND: Routes = [
  {
    path: '',
    title: 'Turnaround',
    loadComponent: () => import('./turnaround-page').then((m) => m.TurnaroundPage),
  },
];
