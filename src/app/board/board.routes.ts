import type { Routes } from '@angular/router';

export const ROUTES_BOARD: Routes = [
  {
    path: ':takeId',
    title: 'Board',
    loadComponent: () => import('./board-page').then((m) => m.BoardPage),
  },
];
