import type { Routes } from '@angular/router';
import { unsavedChangesGuard } from '../shared/side-sheet/unsaved-changes';

export const ROUTES_PEOPLE: Routes = [
  {
    path: '',
    title: 'People',
    loadComponent: () => import('./people-page').then((m) => m.PeoplePage),
    children: [
      {
        path: 'invite',
        title: 'Invite',
        canDeactivate: [unsavedChangesGuard],
        loadComponent: () => import('./invite-sheet').then((m) => m.InviteSheet),
      },
      {
        path: ':personId',
        title: 'Person',
        canDeactivate: [unsavedChangesGuard],
        loadComponent: () => import('./person-sheet').then((m) => m.PersonSheet),
      },
    ],
  },
];
