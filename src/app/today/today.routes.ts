import type { Routes } from '@angular/router';

export const ROUTES_TODAY: Routes = [
  {
    path: '',
    title: 'Today',
    loadComponent: () => import('./today-page').then((m) => m.TodayPage),
  },
];
