import type { Routes } from '@angular/router';

export const ROUTES_GYM: Routes = [
  {
    path: '',
    title: 'Gym',
    loadComponent: () => import('./gym-page').then((m) => m.GymPage),
  },
];
