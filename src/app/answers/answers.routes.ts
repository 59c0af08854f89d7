import type { Routes } from '@angular/router';

export const ROUTES_ANSWERS: Routes = [
  {
    path: '',
    title: 'Answers',
    loadComponent: () => import('./answers-page').then((m) => m.AnswersPage),
  },
  {
    path: ':takeId',
    title: 'Answer',
    loadComponent: () => import('./answer-page').then((m) => m.AnswerPage),
  },
];
