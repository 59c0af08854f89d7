import type { Routes } from '@angular/router';

const page = () => import('./progress-page').then((m) => m.ProgressPage);

export const ROUTES_PROGRESS: Routes = [
  { path: '', title: 'Progress', loadComponent: page },
  { path: ':memberId', title: 'Progress', loadComponent: page },
];
