import type { Routes } from '@angular/router';
import { unsavedChangesGuard } from '../shared/side-sheet/unsaved-changes';

export const ROUTES_ASSIGNMENTS: Routes = [
  {
    path: '',
    title: 'Assignments',
    loadComponent: () => import('./assignments-page').then((m) => m.AssignmentsPage),
    children: [
      {
        path: 'new',
        title: 'A new assignment',
        canDeactivate: [unsavedChangesGuard],
        loadComponent: () => import('./new-assignment-sheet').then((m) => m.NewAssignmentSheet),
      },
    ],
  },
  {
    path: ':assignmentId',
    title: 'Assignment',
    loadComponent: () => import('./assignment-page').then((m) => m.AssignmentPage),
  },
];
