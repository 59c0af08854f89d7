import type { Routes } from '@angular/router';
import { leaveGuard } from './leave-guard';

export const ROUTES_FILMING: Routes = [
  {
    path: ':assignmentId',
    title: 'Film',
    canDeactivate: [leaveGuard],
    loadComponent: () => import('./filming-page').then((m) => m.FilmingPage),
  },
];
