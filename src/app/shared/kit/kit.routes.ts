import type { Routes } from '@angular/router';

export const ROUTES_KIT: Routes = [
  { path: '', loadComponent: () => import('./kit-page').then((m) => m.KitPage) },
];
