import type { Routes } from '@angular/router';

export const ROUTES_FILMING: Routes = [
  {
    path: ':assignmentId',
    title: 'Film',
    loadComponent: () => import('./filming-page').then((m) => m.FilmingPage),
  },
];
