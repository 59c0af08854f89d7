import type { Routes } from '@angular/router';

export const ROUTES_PEOPLE: Routes = [
  {
    path: '',
    title: 'People',
    loadComponent: () => import('./people-page').then((m) => m.PeoplePage),
  },
];
