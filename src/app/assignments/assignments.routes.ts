import type { Routes } from '@angular/router';

export const ROUTES_ASSIGNMENTS: Routes = [
  {
    path: '',
    title: 'Assignments',
    loadComponent: () => import('./assignments-page').then((m) => m.AssignmentsPage),
  },
];
