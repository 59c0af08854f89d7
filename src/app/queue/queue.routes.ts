import type { Routes } from '@angular/router';

export const ROUTES_QUEUE: Routes = [
  {
    path: '',
    title: 'Queue',
    loadComponent: () => import('./queue-page').then((m) => m.QueuePage),
  },
];
