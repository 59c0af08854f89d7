import type { Routes } from '@angular/router';

export const ROUTES_QUEUE: Routes = [
  {
    path: '',
    title: 'Queue',
    loadComponent: () => import('./queue-page').then((m) => m.QueuePage),
  },
  {
    path: 'unplayable',
    title: 'Takes that cannot be played',
    loadComponent: () => import('./unplayable-page').then((m) => m.UnplayablePage),
  },
];
